import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { addDays, daysBetween, weekdayOf } from '../time';
import { datesBetween, weekdayCounts, weekdayHint, yearLabelOf, type Closure } from './term';

const quay = { id: 'quay', weekdays: [1, 2, 3, 4, 5, 6] };
const autumn = { startsOn: '2026-09-08', endsOn: '2026-12-19' };
const closed = (closedOn: string, over: Partial<Closure> = {}): Closure => ({ closedOn, siteId: null, fromMin: null, toMin: null, ...over });
const lessons = (closures: Closure[], site = quay) => weekdayCounts(autumn, closures, site).map((day) => day.lessons);

describe('lessons of a term by weekday', () => {
  it('counts the autumn of the worked example (S04)', () => {
    expect(lessons(['2026-10-12', '2026-11-26', '2026-11-27', '2026-11-28'].map((day) => closed(day)))).toEqual([13, 15, 15, 14, 14, 14]);
  });
  it('a closure elsewhere and one of some hours take no lesson away', () => {
    expect(lessons([closed('2026-10-13', { siteId: 'mill' }), closed('2026-10-14', { fromMin: 900, toMin: 1260 })])).toEqual(lessons([]));
    expect(lessons([closed('2026-10-13', { siteId: 'quay' })])).toEqual(lessons([closed('2026-10-13')]));
  });
  it('without closures each weekday has as many as it has dates, and together they are the days of the term', () => {
    fc.assert(fc.property(fc.integer({ min: 0, max: 3000 }), fc.integer({ min: 1, max: 400 }), (from, days) => {
      const startsOn = addDays('2024-01-01', from);
      const counts = weekdayCounts({ startsOn, endsOn: addDays(startsOn, days) }, [], { id: 'x', weekdays: [1, 2, 3, 4, 5, 6, 7] });
      expect(counts.reduce((sum, day) => sum + day.lessons, 0)).toBe(days + 1);
    }));
  });
});

describe('the hint', () => {
  const hint = (...counts: number[]) => weekdayHint(counts.map((count, index) => ({ weekday: index + 1, lessons: count })));
  it.each([
    [[13, 12, 13, 13, 13], 'Tuesdays have 12, the others 13.'],
    [[12, 12, 13, 13, 13], 'Mondays and Tuesdays have 12, the others 13.'],
    [[12, 13, 13, 13, 14], 'Mondays have 12, Fridays 14, the others 13.'],
    [[12, 13], 'Mondays have 12, Tuesdays 13.'],
    [[13, 13, 13], 'Every weekday has 13.'],
    [[0, 1, 1], 'Mondays have none, the others 1.'],
    [[13], ''],
    [[], ''],
  ])('%j', (counts, sentence) => expect(hint(...counts)).toBe(sentence));
});

it.each([['2026-09-08', '2026/27'], ['2027-01-11', '2026/27'], ['2026-07-31', '2025/26'], ['2026-08-01', '2026/27'], ['2099-09-01', '2099/00']])('a term from %s belongs to %s', (day, label) => expect(yearLabelOf(day)).toBe(label));

it('dates between two days include both, across the end of February and clock changes', () => {
  expect(datesBetween('2028-02-28', '2028-03-01')).toEqual(['2028-02-28', '2028-02-29', '2028-03-01']);
  const dates = datesBetween('2026-10-20', '2026-11-05');
  expect([dates.length, daysBetween(dates[0]!, dates.at(-1)!), weekdayOf(dates[5]!)]).toEqual([17, 16, 7]);
});
