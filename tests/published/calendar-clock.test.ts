import { describe, expect, it } from 'vitest';
import { addDays, instantOf, localDateOf, minuteOfDayOf } from '@/lib/time';

/**
 * The wall clock across clock changes. Sources: the IANA time zone data as told by `zdump` for C01 to C11 (the
 * check list of operations 1.4); RFC 5545 sections 3.3.5 and 3.8.5.3 for C12 to C14.
 */
const NEW_YORK = 'America/New_York';
const LONDON = 'Europe/London';
const SYDNEY = 'Australia/Sydney';
const utc = (text: string) => Date.parse(text) / 1000;
const clock = (at: number, zone: string) => `${localDateOf(at, zone)} ${String(minuteOfDayOf(at, zone)).padStart(4, '0')}`;

describe('C01 to C06 the clocks change at the instant that zdump names', () => {
  it.each([
    ['C01', NEW_YORK, '2026-03-08T07:00Z', ['2026-03-08', 120, 180]], ['C01', NEW_YORK, '2026-11-01T06:00Z', ['2026-11-01', 120, 60]],
    ['C02', NEW_YORK, '2027-03-14T07:00Z', ['2027-03-14', 120, 180]], ['C02', NEW_YORK, '2027-11-07T06:00Z', ['2027-11-07', 120, 60]],
    ['C03', LONDON, '2026-03-29T01:00Z', ['2026-03-29', 60, 120]], ['C03', LONDON, '2026-10-25T01:00Z', ['2026-10-25', 120, 60]],
    ['C04', LONDON, '2027-03-28T01:00Z', ['2027-03-28', 60, 120]], ['C04', LONDON, '2027-10-31T01:00Z', ['2027-10-31', 120, 60]],
    ['C05', SYDNEY, '2026-04-04T16:00Z', ['2026-04-05', 180, 120]], ['C05', SYDNEY, '2026-10-03T16:00Z', ['2026-10-04', 120, 180]],
    ['C06', SYDNEY, '2027-04-03T16:00Z', ['2027-04-04', 180, 120]], ['C06', SYDNEY, '2027-10-02T16:00Z', ['2027-10-03', 120, 180]],
  ] as const)('%s %s %s', (_id, zone, at, [date, before, after]) => {
    // One second before, the clock shows the last minute of the old time; then it jumps.
    expect(clock(utc(at) - 1, zone)).toBe(`${date} ${String(before - 1).padStart(4, '0')}`);
    expect(clock(utc(at), zone)).toBe(`${date} ${String(after).padStart(4, '0')}`);
  });
});

const hoursOf = (date: string, zone: string) => (instantOf(addDays(date, 1), 0, zone) - instantOf(date, 0, zone)) / 3600;

it.each(['Asia/Tokyo', 'America/Phoenix'])('C07 every day of 2026 and 2027 in %s has 24 hours', (zone) => {
  for (let day = 0; day < 730; day += 1) expect(hoursOf(addDays('2026-01-01', day), zone)).toBe(24);
});

it.each([
  ['2026-03-08', NEW_YORK, 23], ['2026-11-01', NEW_YORK, 25], ['2026-04-05', SYDNEY, 25], ['2026-10-04', SYDNEY, 23],
])('C08 %s in %s has %i hours', (date, zone, hours) => expect(hoursOf(date, zone)).toBe(hours));

it.each([
  ['C09', NEW_YORK, '2026-02-23', ['2026-02-23T21:00Z', '2026-03-02T21:00Z', '2026-03-09T20:00Z', '2026-03-16T20:00Z', '2026-03-23T20:00Z']],
  ['C10', LONDON, '2026-03-16', ['2026-03-16T16:00Z', '2026-03-23T16:00Z', '2026-03-30T15:00Z', '2026-04-06T15:00Z', '2026-04-13T15:00Z']],
  ['C11', SYDNEY, '2026-03-23', ['2026-03-23T05:00Z', '2026-03-30T05:00Z', '2026-04-06T06:00Z', '2026-04-13T06:00Z', '2026-04-20T06:00Z']],
])('%s weekly at 16:00 in %s', (_id, zone, first, instants) => {
  expect(instants.map((_instant, week) => instantOf(addDays(first, 7 * week), 960, zone))).toEqual(instants.map(utc));
});

describe('C12 and C13 a clock time that is skipped or comes twice (RFC 5545 section 3.3.5)', () => {
  it.each([
    ['C12', '2007-11-04', 90, '2007-11-04T01:30-04:00'], ['C12', '2007-03-11', 150, '2007-03-11T03:30-04:00'],
    ['C13', '2026-03-08', 150, '2026-03-08T03:30-04:00'], ['C13', '2026-11-01', 90, '2026-11-01T01:30-04:00'],
  ])('%s %s minute %i is %s', (_id, date, minute, at) => expect(instantOf(date, minute, NEW_YORK)).toBe(utc(at)));
});
