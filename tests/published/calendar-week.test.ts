import { expect, it } from 'vitest';
import { addDays, instantOf, mondayOf, weekdayOf } from '@/lib/time';

/**
 * C25: the ISO 8601 week, as far as the school needs it: which Monday a day belongs to. The week number of the
 * source row is told from that Monday here (week 1 holds the first Thursday of the year).
 */
function weekOf(date: string): string {
  const thursday = addDays(mondayOf(date), 3);
  const year = thursday.slice(0, 4);
  const week = Math.floor((Date.parse(thursday) - Date.parse(`${year}-01-01`)) / (7 * 86_400_000)) + 1;
  return `${year}-W${String(week).padStart(2, '0')}-${weekdayOf(date)}`;
}

it.each([
  ['2026-01-01', '2026-W01-4'], ['2025-12-28', '2025-W52-7'], ['2025-12-29', '2026-W01-1'], ['2026-12-31', '2026-W53-4'], ['2027-01-03', '2026-W53-7'],
  ['2027-01-04', '2027-W01-1'], ['2005-01-01', '2004-W53-6'], ['2008-12-29', '2009-W01-1'], ['2010-01-03', '2009-W53-7'],
])('C25 %s is %s', (date, week) => expect(weekOf(date)).toBe(week));

/** C14, RFC 5545 section 3.8.5.3: every day, ten times, from 2 September 1997 at 09:00 in New York. */
it('C14 ten days at 09:00, all in summer time', () => {
  const days = Array.from({ length: 10 }, (_, day) => instantOf(addDays('1997-09-02', day), 540, 'America/New_York'));
  expect(days).toEqual(Array.from({ length: 10 }, (_, day) => Date.UTC(1997, 8, 2 + day, 13) / 1000));
});

/** C15, RFC 5545 section 3.8.5.3: every week until 24 December 1997; standard time from 26 October. */
it('C15 seventeen Tuesdays at 09:00 across the end of summer time', () => {
  const tuesdays = Array.from({ length: 17 }, (_, week) => addDays('1997-09-02', 7 * week));
  expect(tuesdays.map((date) => date.slice(5))).toEqual([
    '09-02', '09-09', '09-16', '09-23', '09-30', '10-07', '10-14', '10-21', '10-28', '11-04', '11-11', '11-18', '11-25', '12-02', '12-09', '12-16', '12-23',
  ]);
  for (const date of tuesdays) expect(instantOf(date, 540, 'America/New_York')).toBe(Date.parse(`${date}T${date < '1997-10-26' ? '13' : '14'}:00Z`) / 1000);
});
