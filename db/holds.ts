import type { Span } from '@/lib/time';
import type { Db, Trx } from './connection';

export type HolderKind = 'teacher' | 'room' | 'student' | 'instrument';
export type Holder = { holderKind: HolderKind; holderId: string };
export type HoldCause = { occurrenceId: string } | { openingOfferId: string } | { maintenanceId: string } | { rentalId: string };

/** Takes each holder for the span; the trigger refuses an overlap with anything live. */
export async function insertHolds(trx: Trx, holds: readonly (Holder & Span)[], cause: HoldCause): Promise<void> {
  if (holds.length > 0) await trx('hold').insert(holds.map((hold) => ({ ...hold, ...cause })));
}

export async function releaseHolds(trx: Trx, cause: HoldCause): Promise<void> {
  await trx('hold').where(cause).delete();
}

export const isHoldOverlap = (error: unknown): boolean => error instanceof Error && error.message.includes('hold_overlap');

export type TakenSpan = Span & Holder;

/** Everything live that touches the span, for many holders of one kind at once. */
export const takenSpans = (db: Db, kind: HolderKind, holderIds: readonly string[], span: Span): Promise<TakenSpan[]> =>
  db<TakenSpan & { isLive: number }>('hold').where({ holderKind: kind, isLive: 1 }).whereIn('holderId', [...holderIds])
    .where('startsAt', '<', span.endsAt).where('startsAt', '>', span.startsAt - 86_400).where('endsAt', '>', span.startsAt)
    .select('holderKind', 'holderId', 'startsAt', 'endsAt').orderBy('startsAt');
