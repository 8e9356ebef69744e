import { addDays, daysBetween, type LocalDate } from '../time';

export type TermSpan = { startsOn: LocalDate; endsOn: LocalDate };
export type Projection = { likelyOn: LocalDate; soonestOn: LocalDate; latestOn: LocalDate; steps: string[] };

const FEWEST_GAPS = 3;
/** Only the last passes tell the present pace. */
const GAPS_LOOKED_AT = 5;

/**
 * When the next rungs should follow at the student's own pace: the median of the days between the last passes,
 * counted on term days only, with the fastest and the slowest gap as its range. Null with fewer than three gaps,
 * and where no term is known that far ahead: a made-up date helps nobody.
 */
export function projectedDate(passedOn: readonly LocalDate[], rungsLeft: number, terms: readonly TermSpan[]): Projection | null {
  const dates = [...passedOn].sort();
  const last = dates.at(-1);
  const gaps = dates.slice(1).map((date, at) => daysBetween(dates[at] ?? date, date)).slice(-GAPS_LOOKED_AT).sort((a, b) => a - b);
  if (last === undefined || gaps.length < FEWEST_GAPS || rungsLeft <= 0) return null;
  const [likelyOn, soonestOn, latestOn] = [medianOf(gaps), gaps[0] ?? 0, gaps.at(-1) ?? 0].map((gap) => termDayAfter(last, Math.max(1, Math.round(gap * rungsLeft)), terms));
  if (!likelyOn || !soonestOn || !latestOn) return null;
  return { likelyOn, soonestOn, latestOn, steps: [
    `Days between the last passes: ${gaps.join(', ')}; the middle one is ${medianOf(gaps)}.`,
    `${rungsLeft} to go: ${medianOf(gaps) * rungsLeft} term days after ${last}.`,
  ] };
}

function medianOf(sorted: readonly number[]): number {
  const middle = Math.floor(sorted.length / 2);
  return sorted.length % 2 === 1 ? (sorted[middle] ?? 0) : ((sorted[middle - 1] ?? 0) + (sorted[middle] ?? 0)) / 2;
}

/** The n-th day after `date` that lies in a term; null when the known terms end before it. */
function termDayAfter(date: LocalDate, count: number, terms: readonly TermSpan[]): LocalDate | null {
  let left = count;
  for (const { startsOn, endsOn } of [...terms].sort((a, b) => a.startsOn.localeCompare(b.startsOn))) {
    const from = startsOn > date ? startsOn : addDays(date, 1);
    const days = daysBetween(from, endsOn) + 1;
    if (days <= 0) continue;
    if (left <= days) return addDays(from, left - 1);
    left -= days;
  }
  return null;
}
