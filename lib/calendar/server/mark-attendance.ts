import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import { findSeat, setArrived, type SeatWithLesson } from '@/db/seats';
import { transaction } from '@/db/transaction';
import { AppError, notFound } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import { assertCan, may } from '@/policies/ability';
import { ATTENDANCE_WORDS, type Attendance, type MarkedAttendance } from '../attendance';
import { absenceKind } from '../lesson-time';
import type { markAttendanceSchema } from '../schema';
import { recordMark, settleCredit } from './record-mark';

type Marking = z.output<typeof markAttendanceSchema>;
export type Marked = { attendance: Attendance; rowVersion: number; sentence: string; lessonState: 'taught' | 'not_taught' | null };

/** A lesson may be marked from a quarter of an hour before it begins; an absence as soon as it is told. */
const EARLY_SECONDS = 15 * 60;
const ABSENCES: readonly MarkedAttendance[] = ['away_with_notice', 'late_notice', 'excused', 'teacher_away', 'school_closed'];

/**
 * Records the one fact from which charge, credit, pay, package and progress follow. An absence told before the
 * deadline is "told in time" whoever types it in and when. A mark may be put right until the lesson is in a
 * closed pay run: by the teacher of the lesson, the lead and the desk. Who took it over for a day marks it on that day
 * (job map, appendix 2).
 */
export async function markAttendance(input: Marking, context: Context): Promise<Marked> {
  const { db, now, actor } = context;
  const seat = await findSeat(db, input.seatId);
  if (!seat) throw notFound('lesson');
  assertMayMark(seat, context);
  if (input.attendance === 'excused') assertCan(context.ability, 'update', 'Excuse', seat);
  assertMarkable(seat, input.attendance, now);
  const toldAt = input.toldAt ?? now;
  if (toldAt > now) throw new AppError('invalid', 'An absence cannot be told in the future.', { toldAt: ['Choose a time that has passed.'] });
  const attendance = judged(input.attendance, seat, toldAt);
  return transaction(db, async (trx) => {
    const isTold = attendance === 'away_with_notice' || attendance === 'late_notice';
    const lessonState = await recordMark(trx, seat, {
      attendance, minutesLate: attendance === 'late' ? (input.minutesLate ?? 0) : null, markedById: actor.personId, markedAt: now,
      toldAt: isTold ? toldAt : null, toldById: isTold ? actor.personId : null, toldVia: isTold ? input.toldVia : null,
    }, input.rowVersion);
    const sentence = await settleCredit(trx, seat, attendance);
    await recordAudit(trx, context, {
      action: 'mark', tableName: 'seat', rowId: seat.id, before: { attendance: seat.attendance }, after: { attendance },
      sentence: `Marked ${seat.studentName} on ${seat.localDate}: ${ATTENDANCE_WORDS[attendance]}.`,
    });
    return { attendance, rowVersion: input.rowVersion + 1, sentence, lessonState };
  });
}

function assertMayMark(seat: SeatWithLesson, { ability, actor, today }: Context): void {
  const isCover = seat.taughtById === actor.personId && seat.plannedTeacherId !== actor.personId;
  if (isCover && seat.localDate !== today && !may(ability, 'update', 'Attendance', seat)) {
    throw new AppError('forbidden', 'A lesson you took over is marked on its own day. The front desk can put it right for you.');
  }
  assertCan(ability, 'update', 'Attendance', seat);
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

/** The desk sees a student come in. It is not a mark: the teacher marks the lesson. */
export async function checkIn({ seatId, hasArrived }: { seatId: string; hasArrived: boolean }, context: Context): Promise<void> {
  const seat = await findSeat(context.db, seatId);
  if (!seat) throw notFound('lesson');
  // A family may tell an absence, which changes the seat too; who has come in is seen at the school.
  assertCan(context.ability, 'manage', 'Seat', seat);
  await transaction(context.db, (trx) => setArrived(trx, seat.id, hasArrived ? context.now : null));
}
