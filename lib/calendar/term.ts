import { addDays, weekdayOf, type LocalDate } from '../time';
import { WEEKDAYS } from './weekday-words';

export type Term = { startsOn: LocalDate; endsOn: LocalDate };
/** A day without teaching. `siteId` null closes every site; a part-day closure keeps the rest of the day. */
export type Closure = { closedOn: LocalDate; siteId: string | null; fromMin: number | null; toMin: number | null };

/**
 * The dates on which a weekly lesson takes place: every such weekday of the term, both ends included, that is
 * not closed. A closure known before billing is simply not counted (job map B3). Catalogue C02.
 */
export function teachingDates(weekday: number, term: Term, closedDates: ReadonlySet<LocalDate>): LocalDate[] {
  const dates: LocalDate[] = [];
  const first = addDays(term.startsOn, (weekday - weekdayOf(term.startsOn) + 7) % 7);
  for (let date = first; date <= term.endsOn; date = addDays(date, 7)) {
    if (!closedDates.has(date)) dates.push(date);
  }
  return dates;
}

/** Dates closed for a lesson at this site and time of day: whole-day closures, and part-day ones that it touches. */
export function closedDatesFor(closures: readonly Closure[], siteId: string, startMin: number, lengthMinutes: number): Set<LocalDate> {
  const touches = ({ fromMin, toMin }: Closure) =>
    fromMin === null || toMin === null || (fromMin < startMin + lengthMinutes && startMin < toMin);
  return new Set(
    closures.filter((closure) => (closure.siteId === null || closure.siteId === siteId) && touches(closure)).map(({ closedOn }) => closedOn),
  );
}

export type WeekdayCount = { weekday: number; lessons: number };

/**
 * How many lessons each weekday of a term has at a site, the days closed from morning to evening taken out (S04). A
 * closure of some hours leaves the day in: who is taught outside them has the lesson.
 */
export function weekdayCounts(term: Term, closures: readonly Closure[], site: { id: string; weekdays: readonly number[] }): WeekdayCount[] {
  const wholeDays = closures.filter(({ fromMin, siteId }) => fromMin === null && (siteId === null || siteId === site.id));
  const closed = new Set(wholeDays.map(({ closedOn }) => closedOn));
  return site.weekdays.map((weekday) => ({ weekday, lessons: teachingDates(weekday, term, closed).length }));
}

/** "Tuesdays have 12, the others 13": what most weekdays have is the measure, the larger number where two are as common. */
export function weekdayHint(counts: readonly WeekdayCount[]): string {
  const groups = new Map<number, number[]>();
  for (const { weekday, lessons } of counts) groups.set(lessons, [...(groups.get(lessons) ?? []), weekday]);
  const [usual, ...others] = [...groups].sort(([lessonsA, daysA], [lessonsB, daysB]) => daysB.length - daysA.length || lessonsB - lessonsA);
  if (!usual) return '';
  const [usualLessons, usualDays] = usual;
  if (others.length === 0) return counts.length === 1 ? '' : `Every weekday has ${usualLessons}.`;
  const parts = others.sort(([a], [b]) => a - b).map(([lessons, days], index) => `${namesOf(days)} ${index === 0 ? 'have ' : ''}${lessons === 0 ? 'none' : lessons}`);
  return `${parts.join(', ')}, ${usualDays.length > 1 ? 'the others' : namesOf(usualDays)} ${usualLessons}.`;
}

function namesOf(weekdays: readonly number[]): string {
  const names = weekdays.map((weekday) => `${WEEKDAYS[weekday - 1]}s`);
  return names.length === 1 ? `${names[0]}` : `${names.slice(0, -1).join(', ')} and ${names.at(-1)}`;
}

/** The school year a term belongs to, from August to July: "2026/27" for one of September 2026 and for one of January 2027. */
export function yearLabelOf(startsOn: LocalDate): string {
  const year = Number(startsOn.slice(0, 4)) - (Number(startsOn.slice(5, 7)) < 8 ? 1 : 0);
  return `${year}/${String((year + 1) % 100).padStart(2, '0')}`;
}

/** Every date from the first to the last, both included. */
export function datesBetween(from: LocalDate, until: LocalDate): LocalDate[] {
  const dates: LocalDate[] = [];
  for (let date = from; date <= until; date = addDays(date, 1)) dates.push(date);
  return dates;
}

/** "week 9 of 13", counted from the term's first Monday-based week; null outside the term. */
export function weekOfTerm(term: Term, date: LocalDate): { week: number; of: number } | null {
  if (date < term.startsOn || date > term.endsOn) return null;
  const monday = addDays(term.startsOn, 1 - weekdayOf(term.startsOn));
  const weeksUntil = (day: LocalDate) => Math.floor((Date.parse(day) - Date.parse(monday)) / (7 * 86_400_000)) + 1;
  return { week: weeksUntil(date), of: weeksUntil(term.endsOn) };
}
