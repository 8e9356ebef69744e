import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import type { Trx } from '@/db/connection';
import { hearingsOf, hearingUnderWay, insertHearing, insertProof, markPlayed, proofsOf, type Hearing } from '@/db/hearings';
import { rebuildStudentRungs } from '@/db/ladder-standing';
import { findRung } from '@/db/ladders';
import { withdrawMails } from '@/db/outbox';
import { findPerson, fullName } from '@/db/people';
import { transaction } from '@/db/transaction';
import { AppError } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { OUTCOME_WORDS, type Outcome } from '../hearing';
import type { undoHearingSchema } from '../schema';
import { undoSecondsLeft } from '../undo';
import { ownHearing } from './record-proof';
import { mailsOf } from './tell-rung-passed';

export type Undone = { hearingId: string; studentId: string; rungId: string; mailsWithdrawn: number };

/**
 * Takes a decision back within ten minutes, by the one who decided. Nothing is rewritten: the decided hearing stays
 * with its proofs and counts for nothing, another one follows it with the same keys and what was played in them,
 * and is decided anew or stopped. The mail of a pass, which has waited, is withdrawn; where the student stands is
 * worked out afresh.
 */
export async function undoHearing({ hearingId }: z.output<typeof undoHearingSchema>, context: Context): Promise<Undone> {
  return transaction(context.db, async (trx) => {
    const decided = await ownHearing(trx, hearingId, context);
    const outcome = await assertMayUndo(trx, decided, context.now);
    const nextId = await writeFollowing(trx, decided, context);
    const mailsWithdrawn = await withdrawMails(trx, mailsOf(decided.id));
    await rebuildStudentRungs(trx, decided.studentId, decided.editionId);
    const [student, rung] = [await findPerson(trx, decided.studentId), await findRung(trx, decided.editionId, decided.rungId)];
    await recordAudit(trx, context, {
      action: 'take_back', tableName: 'hearing', rowId: decided.id, before: { outcome }, after: { followedBy: nextId, mailsWithdrawn },
      sentence: `Took back “${OUTCOME_WORDS[outcome]}” for ${student ? fullName(student) : 'a student'}, ${rung ? `${rung.code} ${rung.title}` : 'a rung'}; the hearing goes on.`,
    });
    return { hearingId: nextId, studentId: decided.studentId, rungId: decided.rungId, mailsWithdrawn };
  });
}

/** Answers the outcome that is taken back. */
async function assertMayUndo(trx: Trx, hearing: Hearing, now: number): Promise<Outcome> {
  if (hearing.outcome === null || hearing.decidedAt === null) throw new AppError('conflict', 'This hearing is not decided, so there is nothing to take back.');
  if (undoSecondsLeft(hearing.decidedAt, now) === 0) throw new AppError('conflict', 'The ten minutes are over: the decision stays. The lead or the owner can ask for a re-check.');
  const newest = (await hearingsOf(trx, hearing.studentId)).find((one) => one.rungId === hearing.rungId);
  if (newest?.id !== hearing.id) throw new AppError('conflict', await followedWords(trx, hearing));
  return hearing.outcome;
}

async function followedWords(trx: Trx, { studentId, rungId }: Hearing): Promise<string> {
  const underWay = await hearingUnderWay(trx, studentId, rungId);
  return underWay ? 'This decision was followed already: the rung is being heard again.' : 'This decision was taken back or followed already.';
}

/** The same keys, and every try in them as it was judged then. Marks of the ear are given anew with the new decision. */
async function writeFollowing(trx: Trx, decided: Hearing, { now }: Context): Promise<string> {
  const { seed, drawn, studentId, rungId, editionId, occurrenceId, termId, assessorId, startedOn } = decided;
  if (seed === null) throw new Error('a decided hearing has its seed');
  const id = newId();
  await insertHearing(trx, { id, studentId, rungId, editionId, occurrenceId, termId, assessorId, startedOn, createdAt: now, seed, drawn, replacesId: decided.id });
  const proofs = await proofsOf(trx, decided.id);
  for (const proof of proofs) await insertProof(trx, { ...proof, id: newId(), hearingId: id });
  if (proofs.length > 0) await markPlayed(trx, id);
  return id;
}
