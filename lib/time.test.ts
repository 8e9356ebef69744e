import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  addDays, addMonths, ageOn, clockOf, daysBetween, instantOf, isLocalDate, isZone, localDateOf, minuteOfClock, minuteOfDayOf, mondayOf, overlaps, sameClockTimeDaysBefore, weekdayOf,
} from './time';

const ZONES = ['America/New_York', 'Europe/Dublin', 'Australia/Sydney', 'Asia/Tokyo', 'Asia/Kolkata', 'America/Phoenix', 'Pacific/Chatham'];
const zone = fc.constantFrom(...ZONES);
const date = fc.integer({ min: 0, max: 8000 }).map((days) => addDays('2015-01-01', days));
/** Clocks change at night everywhere in the list, so these are never skipped and never come twice. */
const waking = fc.integer({ min: 5 * 60, max: 23 * 60 + 59 });

describe('a lesson promises the wall clock', () => {
  it('the instant says the same date and clock time again, in every zone and season', () => {
    fc.assert(fc.property(date, waking, zone, (localDate, startMin, zoneName) => {
      const at = instantOf(localDate, startMin, zoneName);
      expect([localDateOf(at, zoneName), minuteOfDayOf(at, zoneName)]).toEqual([localDate, startMin]);
    }), { numRuns: 500 });
  });
  it('a weekly lesson keeps its clock time, whatever the clocks do in between', () => {
    fc.assert(fc.property(date, waking, zone, (localDate, startMin, zoneName) => {
      for (let week = 0; week <= 52; week += 4) expect(minuteOfDayOf(instantOf(addDays(localDate, 7 * week), startMin, zoneName), zoneName)).toBe(startMin);
    }));
  });
  it('a day in Dublin has 23 and 25 hours when the clocks change, 24 otherwise', () => {
    const hoursOf = (localDate: string) => (instantOf(addDays(localDate, 1), 0, 'Europe/Dublin') - instantOf(localDate, 0, 'Europe/Dublin')) / 3600;
    expect(['2026-03-28', '2026-03-29', '2026-10-25'].map(hoursOf)).toEqual([24, 23, 25]);
  });
  it('a skipped minute moves behind the gap; one that comes twice is the first', () => {
    expect(clockOf(minuteOfDayOf(instantOf('2026-03-29', 90, 'Europe/Dublin'), 'Europe/Dublin'))).toBe('02:30');
    expect(instantOf('2026-10-25', 90, 'Europe/Dublin')).toBe(Date.UTC(2026, 9, 25, 0, 30) / 1000);
  });
  it('the cancel deadline is the same clock time the day before, not 24 hours before', () => {
    const lesson = instantOf('2026-03-29', 960, 'Europe/Dublin');
    const deadline = sameClockTimeDaysBefore('2026-03-29', 960, 'Europe/Dublin', 1);
    expect(minuteOfDayOf(deadline, 'Europe/Dublin')).toBe(960);
    expect(lesson - deadline).toBe(23 * 3600);
  });
});

describe('dates', () => {
  it('days forth and back are the same days', () => {
    fc.assert(fc.property(date, fc.integer({ min: -4000, max: 4000 }), (from, days) => {
      expect(daysBetween(from, addDays(from, days))).toBe(days);
      expect(addDays(addDays(from, days), -days)).toBe(from);
    }));
  });
  it('every date has its Monday within the six days before', () => {
    fc.assert(fc.property(date, (day) => {
      expect(weekdayOf(mondayOf(day))).toBe(1);
      expect(daysBetween(mondayOf(day), day)).toBe(weekdayOf(day) - 1);
    }));
  });
  it('months are counted from the anchor and end where the month ends', () => {
    expect([0, 1, 2, 3, 13].map((months) => addMonths('2026-01-31', months))).toEqual(['2026-01-31', '2026-02-28', '2026-03-31', '2026-04-30', '2027-02-28']);
    expect(addMonths('2028-01-31', 1)).toBe('2028-02-29');
  });
  it.each([
    ['2026-02-28', true], ['2028-02-29', true], ['2026-02-29', false], ['2026-13-01', false], ['2026-1-1', false], ['26-01-01', false], ['2026-01-01T00:00', false], ['', false], ['漢', false],
  ])('“%s” is a date: %s', (text, isDate) => expect(isLocalDate(text)).toBe(isDate));
  it('zones are known by their names', () => {
    expect([...ZONES, 'UTC', 'Mars/Olympus', '', 'Europe/dublin; drop'].map(isZone)).toEqual([...ZONES.map(() => true), true, false, false, false]);
  });
});

describe('age', () => {
  it('turns on the birthday', () => {
    expect([ageOn('2013-05-04', '2026-05-03'), ageOn('2013-05-04', '2026-05-04'), ageOn('2013-05-04', '2013-05-04')]).toEqual([12, 13, 0]);
  });
  it('born on 29 February: on 1 March in common years, on the day in leap years', () => {
    expect([ageOn('2008-02-29', '2026-02-28'), ageOn('2008-02-29', '2026-03-01'), ageOn('2008-02-29', '2028-02-29')]).toEqual([17, 18, 20]);
  });
});

describe('clock times and spans', () => {
  it('every minute of the day is written and read', () => {
    for (let minute = 0; minute < 1440; minute += 1) expect(minuteOfClock(clockOf(minute))).toBe(minute);
  });
  it.each(['24:00', '12:60', '1605', '', '-1:00', '16:5', '16:05:00', 'noon'])('“%s” is no time of day', (text) => expect(minuteOfClock(text)).toBeNull());
  it('spans are half-open and overlap both ways alike', () => {
    const span = fc.tuple(fc.integer({ min: 0, max: 30 }), fc.integer({ min: 1, max: 10 })).map(([startsAt, length]) => ({ startsAt, endsAt: startsAt + length }));
    fc.assert(fc.property(span, span, (a, b) => {
      const shared = Array.from({ length: 40 }, (_, moment) => moment).some((moment) => moment >= a.startsAt && moment < a.endsAt && moment >= b.startsAt && moment < b.endsAt);
      expect([overlaps(a, b), overlaps(b, a)]).toEqual([shared, shared]);
    }));
  });
});
