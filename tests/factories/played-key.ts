import { findHearing } from '../../db/hearings';
import { findRung } from '../../db/ladders';
import { asksOf } from '../../lib/ladder/asks';
import { recordProof, type Recorded } from '../../lib/ladder/server/record-proof';
import type { Context } from '../../lib/server/context';

/** Plays one drawn key of a hearing as it is shown, or changed on purpose. */
export async function playKey(context: Context, hearingId: string, drawnNo: number, change: (keys: number[]) => number[] = (keys) => keys): Promise<Recorded> {
  const hearing = await findHearing(context.db, hearingId);
  const rung = hearing && (await findRung(context.db, hearing.editionId, hearing.rungId));
  const drawn = hearing?.drawn[drawnNo];
  if (!rung || !drawn) throw new Error('no such key');
  const heard = asksOf(rung.spec, drawn).map((ask) => ({ played: change(ask.shown.notes.map(({ key }) => key)), milliseconds: 1400, byEar: null }));
  return recordProof({ hearingId, drawnNo, source: 'midi', heard }, context);
}
