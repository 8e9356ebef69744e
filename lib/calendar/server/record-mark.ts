import 'server-only';
import type { Trx } from '@/db/connection';
import { cancelCredit, countCappedCredits, creditOfSeat, insertCredit, reviveCredit, usedMinutes } from '@/db/credits';
import { setOccurrenceState } from '@/db/occurrences';
import { markSeat, marksOfOccurrence, type Mark, type SeatWithLesson } from '@/db/seats';
import { houseRulesOn } from '@/db/settings';
import { termOn } from '@/db/terms';
import { AppError } from '@/lib/errors';
import { newId } from '@/lib/server/ids';
import { stateWhenMarked, type MarkedAttendance } from '../attendance';
import { creditFor, creditRulesOf, type CreditVerdict } from '../credit';

/** Writes the mark and lets the lesson's own state follow; refuses when somebody else marked it meanwhile. */
export async function recordMark(trx: Trx, seat: SeatWithLesson, mark: Mark, rowVersion: number): Promise<'taught' | 'not_taught' | null> {
  const isMarked = await markSeat(trx, seat.id, rowVersion, mark);
  if (!isMarked) throw new AppError('conflict', 'Somebody else has just marked this lesson. Look again before you change it.');
  const lessonState = stateWhenMarked(await marksOfOccurrence(trx, seat.occurrenceId));
  await setOccurrenceState(trx, seat.occurrenceId, lessonState ?? 'planned');
  return lessonState;
}

/** The make-up credit that follows from a mark; an earlier one of the same lesson is taken back first. */
export async function settleCredit(trx: Trx, seat: SeatWithLesson, attendance: MarkedAttendance): Promise<string> {
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
  return creditFor(attendance, seat.localDate, capped, creditRulesOf(rules));
}
