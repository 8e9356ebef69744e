import 'server-only';
import type * as z from 'zod';
import type { Db } from '@/db/connection';
import { countHeard, findHearing, insertProof, markPlayed, proofsOf, type Hearing } from '@/db/hearings';
import { findRung, type Rung } from '@/db/ladders';
import { transaction } from '@/db/transaction';
import { AppError, notFound } from '@/lib/errors';
import { JUDGE_VERSION } from '@/lib/harmony/verdict';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { assertCan } from '@/policies/ability';
import { asksOf, judgeAsk } from '../asks';
import { isKeyHeard, type HeardChord } from '../hearing';
import { isSpoken } from '../play-spec';
import type { recordProofSchema } from '../schema';

type Playing = z.output<typeof recordProofSchema>;
export type Recorded = { isHeard: boolean; heard: HeardChord[]; keysHeard: number; tryNo: number };

const MOST_TRIES = 30;

/** The hearing, for the teacher who holds it; a colleague's and a missing one answer alike. */
export async function ownHearing(db: Db, hearingId: string, { ability }: Pick<Context, 'ability'>): Promise<Hearing> {
  const hearing = await findHearing(db, hearingId);
  if (!hearing) throw notFound('hearing');
  assertCan(ability, 'update', 'Hearing', hearing);
  return hearing;
}

/**
 * Stores what was played for one drawn key and judges it here, whatever the screen thought: the proof is what the
 * keys say. At a piano without MIDI the teacher's ear takes their place, and the proof says so. A key may be tried
 * again; every try is kept and the last one counts.
 */
export async function recordProof(input: Playing, context: Context): Promise<Recorded> {
  return transaction(context.db, async (trx) => {
    const hearing = await ownHearing(trx, input.hearingId, context);
    if (hearing.state !== 'keys_drawn' && hearing.state !== 'played') throw new AppError('conflict', 'This hearing is over; nothing more can be added to it.');
    const rung = await findRung(trx, hearing.editionId, hearing.rungId);
    if (!rung) throw notFound('rung');
    const { heard, isHeard } = judged(input, hearing, rung);
    const before = await proofsOf(trx, hearing.id);
    const tryNo = before.filter(({ drawnNo }) => drawnNo === input.drawnNo).length + 1;
    if (tryNo > MOST_TRIES) throw new AppError('invalid', 'This key was tried often enough for today.');
    await insertProof(trx, {
      id: newId(), hearingId: hearing.id, drawnNo: input.drawnNo, tryNo, heard, isHeard, source: input.source, judgeVersion: JUDGE_VERSION, at: context.now,
    });
    if (hearing.state === 'keys_drawn') await markPlayed(trx, hearing.id);
    return { isHeard, heard, tryNo, keysHeard: countHeard(await proofsOf(trx, hearing.id)) };
  });
}

function judged(input: Playing, hearing: Hearing, rung: Rung): { heard: HeardChord[]; isHeard: boolean } {
  const drawn = hearing.drawn[input.drawnNo];
  if (!drawn) throw new AppError('invalid', 'This key was not drawn in this hearing.');
  const asks = asksOf(rung.spec, drawn);
  if (input.heard.length > asks.length) throw new AppError('invalid', 'More chords were played than asked.');
  const spoken = isSpoken(rung.spec.how);
  const heard = input.heard.map(({ played, milliseconds, byEar }, at): HeardChord => {
    const ask = asks[at];
    if (!ask) throw new AppError('invalid', 'More chords were played than asked.');
    if (spoken && byEar === null) throw new AppError('invalid', 'This rung is told, not played: say whether it was right.');
    if (byEar !== null && input.source !== 'ear') throw new AppError('invalid', 'What the keys told cannot be overruled by ear; decide the hearing with a reason instead.');
    return { symbol: ask.symbol, played, milliseconds, byEar, verdict: byEar === null ? judgeAsk(ask, played) : null };
  });
  return { heard, isHeard: isKeyHeard(heard, asks.length, rung.criteria) };
}
