import { spanOf } from '../calendar/lesson-time';
import { closedDatesFor, teachingDates, type Closure, type Term } from '../calendar/term';
import { overlaps, type LocalDate, type Span } from '../time';
import type { EnrolmentFacts, Reference } from './rows';

const HOLDERS = ['room', 'teacher', 'student'] as const;
export type Holder = (typeof HOLDERS)[number];

/** Where and in which part of the term the lessons are laid. `from` is the first day on which a lesson may stand. */
export type LessonPlan = { term: Term; from: LocalDate; siteId: string; zone: string; closures: readonly Closure[] };
/** What the calendar already has for a room, teacher or student of the school. */
export type TakenBy = (holder: Holder, reference: Reference) => readonly Span[];

const isSame = (a: Reference, b: Reference): boolean => JSON.stringify(a) === JSON.stringify(b);

/** The teaching days of a weekly lesson, from its own first day or the plan's, whichever is later. */
export function datesOf({ weekday, startMin, lengthMinutes, startsOn }: EnrolmentFacts, { term, from, siteId, closures }: LessonPlan): LocalDate[] {
  const firstOn = [term.startsOn, from, startsOn ?? from].sort().at(-1) ?? from;
  if (firstOn > term.endsOn) return [];
  return teachingDates(weekday, { startsOn: firstOn, endsOn: term.endsOn }, closedDatesFor(closures, siteId, startMin, lengthMinutes));
}

const meets = (a: EnrolmentFacts, b: EnrolmentFacts): boolean =>
  a.weekday === b.weekday && a.startMin < b.startMin + b.lengthMinutes && b.startMin < a.startMin + a.lengthMinutes;

/** Whoever of room, teacher and student would be in two places at once: beside the rows above, or in the calendar. */
export function slotFaults(row: EnrolmentFacts, above: readonly EnrolmentFacts[], plan: LessonPlan | null, takenBy: TakenBy): string[] {
  const rivals = above.filter((other) => meets(row, other));
  const busy = HOLDERS.filter((holder) => rivals.some((other) => isSame(row[holder], other[holder])));
  if (busy.length > 0) return busy.map((holder) => `${holder} is taken at that time`);
  return plan ? calendarFaults(row, plan, takenBy) : [];
}

function calendarFaults(row: EnrolmentFacts, plan: LessonPlan, takenBy: TakenBy): string[] {
  const dates = datesOf(row, plan);
  if (dates.length === 0) return ['no teaching day is left for it in the term'];
  const spans = dates.map((localDate) => ({ localDate, ...spanOf({ localDate, startMin: row.startMin, lengthMinutes: row.lengthMinutes, zone: plan.zone }) }));
  return HOLDERS.flatMap((holder) => {
    const others = takenBy(holder, row[holder]);
    const first = spans.find((span) => others.some((other) => overlaps(span, other)));
    return first ? [`${holder} is taken at that time on ${first.localDate}`] : [];
  });
}
