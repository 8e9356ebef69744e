import { instantOf, type LocalDate, type Span } from '../time';

/** Taken spans of one teacher or room, sorted by start and never overlapping (the database sees to that). */
export type Busy = readonly Span[];

/** Whether nothing taken overlaps the span. Binary search, because an opening search asks this very often. */
export function freeOn(busy: Busy, span: Span): boolean {
  let low = 0;
  let high = busy.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((busy[middle]?.endsAt ?? 0) <= span.startsAt) low = middle + 1;
    else high = middle;
  }
  const next = busy[low];
  return next === undefined || next.startsAt >= span.endsAt;
}

export const sortedBusy = (spans: readonly Span[]): Busy => [...spans].sort((a, b) => a.startsAt - b.startsAt);

export type DayClock = { span: (date: LocalDate, startMin: number, lengthMinutes: number) => Span };

/**
 * Instants of many times on the same days. One time-zone look-up a date, at noon: clocks change in the small
 * hours, so noon's offset holds for every hour in which a school teaches.
 */
export function dayClock(zone: string): DayClock {
  const noons = new Map<LocalDate, number>();
  return {
    span(date, startMin, lengthMinutes) {
      const noon = noons.get(date) ?? instantOf(date, 720, zone);
      noons.set(date, noon);
      const startsAt = noon + (startMin - 720) * 60;
      return { startsAt, endsAt: startsAt + lengthMinutes * 60 };
    },
  };
}
