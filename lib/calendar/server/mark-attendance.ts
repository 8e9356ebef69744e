import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import { cancelCredit, countCappedCredits, creditOfSeat, insertCredit, reviveCredit, usedMinutes } from '@/db/credits';
import type { Trx } from '@/db/connection';
import { setOccurrenceState } from '@/db/occurrences';
import { findSeat, markSeat, marksOfOccurrence, setArrived, type SeatWithLesson } from '@/db/seats';
import { houseRulesOn } from '@/db/settings';
import { termOn } from '@/db/terms';
import { transaction } from '@/db/transaction';
import { AppError, notFound } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { assertCan } from '@/policies/ability';
import { ATTENDANCE_WORDS, stateWhenMarked, type Attendance, type MarkedAttendance } from '../attendance';
import { creditFor, type CreditVerdict } from '../credit';
import { absenceKind } from '../lesson-time';
import type { markAttendanceSchema } from '../schema';

type Marking = z.output<typeof markAttendanceSchema>;
export type Marked = { attendance: Attendance; rowVersion: number; sentence: string; lessonState: 'taught' | 'not_taught' | null };

/** A lesson may be marked from a quarter of an hour before it begins; an absence as soon as it is told. */
const EARLY_SECONDS = 15 * 60;
const ABSENCES: readonly MarkedAttendance[] = ['away_with_notice', 'late_notice', 'excused', 'teacher_away', 'school_closed'];

/**
 * Records the one fact from which charge, credit, pay, package and progress follow. An absence told before the
 * deadline is "told in time" whoever types it in and when. A mark may be put right until the lesson is in a
 * closed pay run.
 */
export async function markAttendance(input: Marking, context: Context): Promise<Marked> {
  const { db, now, actor } = context;
  const seat = await findSeat(db, input.seatId);
  if (!seat) throw notFound('lesson');
  assertCan(context.ability, 'update', 'Attendance', seat);
  if (input.attendance === 'excused') assertCan(context.ability, 'update', 'Excuse', seat);
  assertMarkable(seat, input.attendance, now);
  const toldAt = input.toldAt ?? now;
  if (toldAt > now) throw new AppError('invalid', 'An absence cannot be told in the future.', { toldAt: ['Choose a time that has passed.'] });
  const attendance = judged(input.attendance, seat, toldAt);
  return transaction(db, async (trx) => {
    const isTold = attendance === 'away_with_notice' || attendance === 'late_notice';
    const isMarked = await markSeat(trx, seat.id, input.rowVersion, {
      attendance, minutesLate: attendance === 'late' ? (input.minutesLate ?? 0) : null, markedById: actor.personId, markedAt: now,
      toldAt: isTold ? toldAt : null, toldById: isTold ? actor.personId : null, toldVia: isTold ? input.toldVia : null,
    });
    if (!isMarked) throw new AppError('conflict', 'Somebody else has just marked this lesson. Look again before you change it.');
    const sentence = await settleCredit(trx, seat, attendance);
    const lessonState = stateWhenMarked(await marksOfOccurrence(trx, seat.occurrenceId));
    await setOccurrenceState(trx, seat.occurrenceId, lessonState ?? 'planned');
    await recordAudit(trx, context, {
      action: 'mark', tableName: 'seat', rowId: seat.id, before: { attendance: seat.attendance }, after: { attendance },
      sentence: `Marked ${seat.studentName} on ${seat.localDate}: ${ATTENDANCE_WORDS[attendance]}.`,
    });
    return { attendance, rowVersion: input.rowVersion + 1, sentence, lessonState };
  });
}

function assertMarkable(seat: SeatWithLesson, attendance: MarkedAttendance, now: number): void {
  if (seat.lockedByPayRunId) throw new AppError('conflict', 'This lesson is in a closed pay run. Ask the owner for a correction in the next one.');
  if (['cancelled', 'moved', 'closed_by_school'].includes(seat.occurrenceState)) throw new AppError('conflict', 'This lesson did not stay in the calendar.');
  if (!ABSENCES.includes(attendance) && now < seat.startsAt - EARLY_SECONDS) {
    throw new AppError('invalid', 'This lesson has not begun. Only an absence can be recorded before.');
  }
}

/** The deadline decides between "in time" and "late", not the person at the keyboard. */
function judged(attendance: MarkedAttendance, { cancelDeadlineAt }: SeatWithLesson, toldAt: number): MarkedAttendance {
  const isTold = attendance === 'away_with_notice' || attendance === 'late_notice';
  return isTold && cancelDeadlineAt !== null ? absenceKind(toldAt, cancelDeadlineAt) : attendance;
}

async function settleCredit(trx: Trx, seat: SeatWithLesson, attendance: MarkedAttendance): Promise<string> {
  if (!seat.enrolmentId || seat.source !== 'roster') return '';
  const existing = await creditOfSeat(trx, seat.id);
  if (existing) await takeBack(trx, existing.id);
  const { credit, sentence } = await creditVerdict(trx, seat, seat.enrolmentId, attendance);
  if (!credit) return sentence;
  const change = { cause: credit.cause, minutes: seat.lengthMinutes, lastOn: credit.lastOn, countsToCap: credit.countsToCap ? 1 : 0 };
  if (existing) await reviveCredit(trx, existing.id, change);
  else await insertCredit(trx, { id: newId(), studentId: seat.studentId, enrolmentId: seat.enrolmentId, sourceSeatId: seat.id, bornOn: seat.localDate, state: 'live', ...change });
  return sentence;
}

async function takeBack(trx: Trx, creditId: string): Promise<void> {
  if ((await usedMinutes(trx, creditId)) > 0) {
    throw new AppError('conflict', 'The make-up credit from this lesson has been used already. The owner decides what happens.');
  }
  await cancelCredit(trx, creditId);
}

async function creditVerdict(trx: Trx, seat: SeatWithLesson, enrolmentId: string, attendance: MarkedAttendance): Promise<CreditVerdict> {
  const [rules, term] = [await houseRulesOn(trx, seat.localDate), await termOn(trx, seat.localDate)];
  const capped = await countCappedCredits(trx, enrolmentId, term?.startsOn ?? seat.localDate, term?.endsOn ?? seat.localDate);
  return creditFor(attendance, seat.localDate, capped, { capPerTerm: rules['credit.cap_per_term'], validDays: rules['credit.valid_days'] });
}

/** The desk sees a student come in. It is not a mark: the teacher marks the lesson. */
export async function checkIn({ seatId, hasArrived }: { seatId: string; hasArrived: boolean }, context: Context): Promise<void> {
  const seat = await findSeat(context.db, seatId);
  if (!seat) throw notFound('lesson');
  assertCan(context.ability, 'update', 'Seat', seat);
  await transaction(context.db, (trx) => setArrived(trx, seat.id, hasArrived ? context.now : null));
}
