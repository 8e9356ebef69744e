import { addDays, weekdayOf, type LocalDate } from '../time';

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

/** "week 9 of 13", counted from the term's first Monday-based week; null outside the term. */
export function weekOfTerm(term: Term, date: LocalDate): { week: number; of: number } | null {
  if (date < term.startsOn || date > term.endsOn) return null;
  const monday = addDays(term.startsOn, 1 - weekdayOf(term.startsOn));
  const weeksUntil = (day: LocalDate) => Math.floor((Date.parse(day) - Date.parse(monday)) / (7 * 86_400_000)) + 1;
  return { week: weeksUntil(date), of: weeksUntil(term.endsOn) };
}
