import { addDays, mondayOf, type LocalDate } from '@/lib/time';

export type DemoTerm = { name: string; yearLabel: string; startsOn: LocalDate; endsOn: LocalDate; state: 'planned' | 'published' | 'closed' };

const TERM_WEEKS = 13;
const BREAK_WEEKS = 2;
/** The demo school is always found in this week of its term. */
const WEEK_NOW = 9;

const SEASONS = ['Winter', 'Winter', 'Spring', 'Spring', 'Spring', 'Summer', 'Summer', 'Summer', 'Autumn', 'Autumn', 'Autumn', 'Winter'] as const;

/** Last term closed, one under way around today, the next in planning. */
export function demoTerms(today: LocalDate): { last: DemoTerm; current: DemoTerm; next: DemoTerm } {
  const start = addDays(mondayOf(today), -7 * (WEEK_NOW - 1));
  const step = 7 * (TERM_WEEKS + BREAK_WEEKS);
  return {
    last: termFrom(addDays(start, -step), 'closed'),
    current: termFrom(start, 'published'),
    next: termFrom(addDays(start, step), 'planned'),
  };
}

function termFrom(startsOn: LocalDate, state: DemoTerm['state']): DemoTerm {
  const [year = '', month = '1'] = startsOn.split('-');
  return { name: `${SEASONS[Number(month) - 1] ?? 'Autumn'} term`, yearLabel: year, startsOn, endsOn: addDays(startsOn, TERM_WEEKS * 7 - 2), state };
}

/** One planned day off in the fifth week of each term, and the days around the turn of the year. */
export function demoClosures({ startsOn, endsOn }: DemoTerm): { closedOn: LocalDate; reason: string }[] {
  const closures = [{ closedOn: addDays(startsOn, 28), reason: 'Bank holiday' }];
  for (let date = startsOn; date <= endsOn; date = addDays(date, 1)) {
    const day = date.slice(5);
    if (day >= '12-24' || day <= '01-01') closures.push({ closedOn: date, reason: 'Turn of the year' });
  }
  return closures.filter(({ closedOn }, index) => closures.findIndex((other) => other.closedOn === closedOn) === index);
}
