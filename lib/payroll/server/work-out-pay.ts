import 'server-only';
import type { Db } from '@/db/connection';
import { approvedMileage, approvedTime, engagementsIn, lessonsBegun, seatsOfLessons, type Engagement, type PaySeat, type TaughtLesson } from '@/db/pay-facts';
import { allPayRates, allPayRules } from '@/db/pay-rates';
import type { PayRunWithPeriod } from '@/db/pay-runs';
import { datedConsequences } from '@/db/settings';
import type { MoneyWords } from '@/lib/explained';
import type { EpochSeconds, LocalDate } from '@/lib/time';
import { payLineOfMileage, payLineOfTime, payLinesOfLesson, type LessonFacts, type PayLine } from '../pay-lines';
import { WORK_OF_LESSON } from '../rates';

/** Visitors from another class and make-up guests do not change a class's size. */
const SIZED = new Set(['roster', 'drop_in', 'trial']);

type Moment = { now: EpochSeconds; words: MoneyWords };

/** Every pay line of a run, from the lessons that have begun, the marks, approved time and the dated rates and rules. */
export async function workOutPay(db: Db, run: Pick<PayRunWithPeriod, 'startsOn' | 'endsOn' | 'legalEntityId' | 'engagementKind'>, { now, words }: Moment): Promise<PayLine[]> {
  const period = { from: run.startsOn, to: run.endsOn };
  const engagements = await engagementsIn(db, period);
  const own = new Set(engagements.filter(({ legalEntityId, kind }) => legalEntityId === run.legalEntityId && kind === run.engagementKind).map(({ engagementId }) => engagementId));
  const facts = { rates: await allPayRates(db), rules: await allPayRules(db), consequences: await datedConsequences(db), words };
  const seats = seatsByLesson(await seatsOfLessons(db, period));
  const lessons = (await lessonsBegun(db, period, now)).flatMap((lesson) => {
    const known = lessonFacts(lesson, seats.get(lesson.occurrenceId) ?? [], engagements);
    return known ? payLinesOfLesson(known, facts) : [];
  });
  const time = (await approvedTime(db, period)).map((entry) => payLineOfTime(entry, facts));
  const mileage = (await approvedMileage(db, period)).map((entry) => payLineOfMileage(entry, words));
  return [...lessons, ...time, ...mileage].filter(({ engagementId }) => own.has(engagementId));
}

function seatsByLesson(seats: readonly PaySeat[]): Map<string, PaySeat[]> {
  const groups = new Map<string, PaySeat[]>();
  for (const seat of seats) {
    const known = groups.get(seat.occurrenceId);
    if (known) known.push(seat);
    else groups.set(seat.occurrenceId, [seat]);
  }
  return groups;
}

/** Null for what pays nothing by itself: no seats, or cancelled before anybody was marked. */
function lessonFacts(lesson: TaughtLesson, seats: readonly PaySeat[], engagements: readonly Engagement[]): LessonFacts | null {
  const workType = WORK_OF_LESSON[lesson.code];
  if (!workType || seats.length === 0) return null;
  if (lesson.state === 'cancelled' && seats.some(({ attendance }) => attendance === 'expected')) return null;
  const workerOf = (personId: string | null) => (personId === null ? null : engagementOf(engagements, { personId, on: lesson.localDate, legalEntityId: lesson.legalEntityId }));
  return {
    occurrenceId: lesson.occurrenceId, localDate: lesson.localDate, startMin: lesson.startMin, lengthMinutes: lesson.lengthMinutes, lessonTypeId: lesson.lessonTypeId, workType, label: lesson.label, siteId: lesson.siteId,
    planned: workerOf(lesson.plannedTeacherId), taughtBy: workerOf(lesson.taughtById),
    seats: seats.map(({ studentName, attendance, source }) => ({ studentName, attendance, countsForSize: SIZED.has(source) })),
  };
}

/** The engagement under which a person works on a day: the one with the site's legal entity, if there are several. */
function engagementOf(engagements: readonly Engagement[], { personId, on, legalEntityId }: { personId: string; on: LocalDate; legalEntityId: string }): Engagement | null {
  const valid = engagements.filter((engagement) => engagement.personId === personId && engagement.startsOn <= on && (engagement.endsOn === null || on <= engagement.endsOn));
  return valid.find((engagement) => engagement.legalEntityId === legalEntityId) ?? valid[0] ?? null;
}
