import 'server-only';
import { countCappedCredits, liveCreditsOf } from '@/db/credits';
import { recordAudit } from '@/db/audit';
import { lessonsOfStudents, type UpcomingLesson } from '@/db/student-lists';
import { findPeople, fullName } from '@/db/people';
import { findSeat } from '@/db/seats';
import { houseRulesOn } from '@/db/settings';
import { termOn } from '@/db/terms';
import { transaction } from '@/db/transaction';
import { AppError, notFound } from '@/lib/errors';
import { formatDate } from '@/lib/format';
import type { Context } from '@/lib/server/context';
import { addDays } from '@/lib/time';
import { assertCan, may } from '@/policies/ability';
import { creditFor, creditRulesOf } from '../credit';
import { absenceKind } from '../lesson-time';
import { recordMark, settleCredit } from './record-mark';

export type FamilyLessons = { students: { id: string; name: string }[]; lessons: UpcomingLesson[]; credits: { studentName: string; minutes: number; lastOn: string }[] };

/** The lessons of one's own children, or one's own: what was and what comes. */
export async function familyLessons({ from, until }: { from: string; until: string }, { db, actor, today }: Context): Promise<FamilyLessons> {
  const people = await findPeople(db, actor.studentIds);
  const nameOf = new Map(people.map((person) => [person.id, person.calledName ?? person.givenName]));
  const credits = await liveCreditsOf(db, actor.studentIds, today);
  return {
    students: people.map((person) => ({ id: person.id, name: fullName(person) })), lessons: await lessonsOfStudents(db, actor.studentIds, { from, until }),
    credits: credits.map(({ studentId, minutes, lastOn }) => ({ studentName: nameOf.get(studentId) ?? '', minutes, lastOn })),
  };
}

export type AbsenceEffect = { inTime: boolean; sentences: string[] };

/** What telling us now would mean, said before anything is sent. */
export async function absenceEffect({ seatId }: { seatId: string }, { db, ability, now, school }: Context): Promise<AbsenceEffect> {
  const seat = await findSeat(db, seatId);
  if (!seat || !may(ability, 'update', 'Seat', seat)) throw notFound('lesson');
  const kind = absenceKind(now, seat.cancelDeadlineAt ?? seat.startsAt);
  const inTime = kind === 'away_with_notice';
  const [rules, term] = [await houseRulesOn(db, seat.localDate), await termOn(db, seat.localDate)];
  const capped = seat.enrolmentId ? await countCappedCredits(db, seat.enrolmentId, term?.startsOn ?? seat.localDate, term?.endsOn ?? seat.localDate) : 0;
  const verdict = creditFor(kind, seat.localDate, capped, creditRulesOf(rules));
  const credit = verdict.credit ? `${seat.lengthMinutes} minutes to make up, by ${formatDate(verdict.credit.lastOn, school.locale, 'day')}.` : verdict.sentence;
  const late = verdict.credit ? ['The time to tell us has passed.', credit] : ['The time to tell us has passed, so no make-up lesson follows.'];
  const bill = rules['attendance.consequences'][kind].charged ? 'The lesson stays on the bill.' : 'Where lessons are paid one by one, this one is not charged.';
  return { inTime, sentences: [...(inTime ? ['You are telling us in good time.', credit] : late), bill] };
}

/** A guardian, or an adult student, says that a lesson will be missed. The deadline decides what follows. */
export async function reportAbsence({ seatId }: { seatId: string }, context: Context): Promise<{ sentence: string }> {
  const { db, ability, now, actor, today } = context;
  const seat = await findSeat(db, seatId);
  if (!seat) throw notFound('lesson');
  assertCan(ability, 'update', 'Seat', seat);
  if (seat.attendance !== 'expected') throw new AppError('conflict', 'This lesson has been marked already.');
  if (seat.localDate < today || seat.startsAt <= now) throw new AppError('conflict', 'This lesson has begun. Please ring the school.');
  if (seat.localDate > addDays(today, 180)) throw new AppError('invalid', 'This lesson is too far ahead. Please ring the school.');
  const attendance = absenceKind(now, seat.cancelDeadlineAt ?? seat.startsAt);
  return transaction(db, async (trx) => {
    await recordMark(trx, seat, { attendance, minutesLate: null, markedById: actor.personId, markedAt: now, toldAt: now, toldById: actor.personId, toldVia: 'screen' }, seat.rowVersion);
    const sentence = await settleCredit(trx, seat, attendance);
    await recordAudit(trx, context, { action: 'absence', tableName: 'seat', rowId: seat.id, after: { attendance }, sentence: `${seat.studentName} will miss ${seat.localDate}, told on the screen.` });
    return { sentence };
  });
}
