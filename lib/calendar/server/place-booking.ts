import 'server-only';
import type { Trx } from '@/db/connection';
import { insertHolds, isHoldOverlap, type Holder } from '@/db/holds';
import { insertOccurrence, insertSeats, type NewSeat } from '@/db/occurrences';
import { findRoom } from '@/db/rooms';
import { houseRulesOn } from '@/db/settings';
import { AppError } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import type { Span } from '@/lib/time';
import type { Clash } from '../clash';
import { cancelDeadlineOf, spanOf } from '../lesson-time';
import { clashesWith, type BookingWish } from './booking-rules';

export type SeatSource = NewSeat['source'];
export type Placement = BookingWish & { seriesId?: string | null; enrolmentOf?: ReadonlyMap<string, string>; source: SeatSource };
export type Placed = { id: string; span: Span; notes: Clash[] };

/** Which hard rules the caller may pass over, with a reason recorded elsewhere: an import brings lessons as they are. */
export type Allowances = { passOver?: readonly Clash['rule'][] };

/**
 * Puts one booking into the calendar inside the caller's transaction: checks every rule, writes the lesson, its
 * seats and its holds. Refuses with the sentence that says who has the place; the database's own trigger is
 * the last guard, should two desks press at once.
 */
export async function placeBooking(trx: Trx, context: Pick<Context, 'actor'>, wish: Placement, { passOver = [] }: Allowances = {}): Promise<Placed> {
  const clashes = (await clashesWith(trx, wish)).filter(({ rule }) => !passOver.includes(rule));
  const hard = clashes.filter(({ isHard }) => isHard);
  if (hard.length > 0) throw new AppError('conflict', hard.map(({ sentence }) => sentence).join(' '), fieldsOf(hard));
  return { ...(await writeBooking(trx, context, wish)), notes: clashes };
}

/** Writes without asking the rules; the overlap trigger still refuses. For callers who have checked. */
export async function writeBooking(trx: Trx, { actor }: Pick<Context, 'actor'>, wish: Placement): Promise<{ id: string; span: Span }> {
  const [id, span] = [newId(), spanOf(wish)];
  await insertOccurrence(trx, {
    id, ...span, seriesId: wish.seriesId ?? null, lessonTypeId: wish.lessonType.id, subjectId: wish.subjectId, title: wish.title,
    localDate: wish.localDate, startMin: wish.startMin, lengthMinutes: wish.lengthMinutes, zone: wish.zone, siteId: wish.siteId, roomId: wish.roomId,
    plannedTeacherId: wish.teacherId, mode: wish.mode, cancelDeadlineAt: cancelDeadlineOf(wish, (await houseRulesOn(trx, wish.localDate))['cancel.days_before']), createdBy: actor.personId,
  });
  await insertSeats(trx, wish.studentIds.map((studentId) => ({ id: newId(), occurrenceId: id, studentId, enrolmentId: wish.enrolmentOf?.get(studentId) ?? null, source: wish.source })));
  await takeHolds(trx, id, wish, span);
  return { id, span };
}

/** A room is taken for its turnover as well; the lesson itself keeps its length. */
export async function takeHolds(trx: Trx, occurrenceId: string, wish: Pick<BookingWish, 'teacherId' | 'roomId' | 'studentIds'>, span: Span): Promise<void> {
  const turnover = wish.roomId ? ((await findRoom(trx, wish.roomId))?.turnoverMin ?? 0) : 0;
  const holders: (Holder & Span)[] = [
    ...(wish.teacherId ? [{ holderKind: 'teacher' as const, holderId: wish.teacherId, ...span }] : []),
    ...(wish.roomId ? [{ holderKind: 'room' as const, holderId: wish.roomId, startsAt: span.startsAt, endsAt: span.endsAt + turnover * 60 }] : []),
    ...wish.studentIds.map((holderId) => ({ holderKind: 'student' as const, holderId, ...span })),
  ];
  try {
    await insertHolds(trx, holders, { occurrenceId });
  } catch (error) {
    if (isHoldOverlap(error)) throw new AppError('conflict', 'This place was just taken. Look for openings again.');
    throw error;
  }
}

const FIELD_OF: Partial<Record<Clash['rule'], string>> = { room: 'roomId', turnover: 'roomId', capacity: 'roomId', teacher: 'teacherId', availability: 'teacherId', qualification: 'teacherId', background_check: 'teacherId' };

function fieldsOf(clashes: readonly Clash[]): Record<string, string[]> {
  const fields: Record<string, string[]> = {};
  for (const { rule, sentence } of clashes) (fields[FIELD_OF[rule] ?? 'startMin'] ??= []).push(sentence);
  return fields;
}
