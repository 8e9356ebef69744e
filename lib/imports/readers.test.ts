import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readLevel, readMoney, readSeats, readShare } from './amounts';
import { phoneKey, readAnswer, readEmail, readPhone } from './answers';
import type { Cell } from './cell';
import { dateOrderOf, needsDateOrder, readDate } from './dates';
import { readFeatures } from './features';
import { readMinutes, readTime, readWeekday, readWeekdays } from './times';

const text = (typed: string): Cell => ({ kind: 'text', text: typed });
const number = (value: number, isPercent = false): Cell => ({ kind: 'number', value, isPercent });
const dateCell = (date: string, minute: number): Cell => ({ kind: 'date', date, minute });
const TODAY = '2026-11-17';

describe('dates', () => {
  it('decides day or month first once for a column, by the cell that can only be one of them (S40)', () => {
    const column = [text('13/02/2014'), text('02/03/2015')];
    expect(dateOrderOf(column)).toBe('day_first');
    expect(readDate(text('02/03/2015'), dateOrderOf(column), TODAY)).toEqual({ value: '2015-03-02' });
    expect(dateOrderOf([text('02/13/2014'), text('02/03/2015')])).toBe('month_first');
  });
  it('asks when nothing decides or the cells contradict each other', () => {
    expect(dateOrderOf([text('02/03/2015')])).toBeNull();
    expect(needsDateOrder([text('02/03/2015')])).toBe(true);
    expect(needsDateOrder([text('03/03/2015'), text('2015-02-03')])).toBe(false);
    expect(dateOrderOf([text('13/02/2014'), text('02/13/2014')])).toBeNull();
    expect(readDate(text('02/03/2015'), null, TODAY)).toEqual({ fault: 'day or month first is not decided' });
  });
  it.each([
    [number(42_005), '2015-01-01'], [text('2014-04-17'), '2014-04-17'], [text('17 Apr 2014'), '2014-04-17'], [text('April 17, 2014'), '2014-04-17'],
    [text('3rd May 14'), '2014-05-03'], [text('1/2/27'), '1927-02-01'], [text('29.02.2024'), '2024-02-29'], [dateCell('2013-02-01', 0), '2013-02-01'],
  ])('reads %o', (cell, date) => expect(readDate(cell, 'day_first', TODAY)).toEqual({ value: date }));
  it.each([
    [text('31/02/2014'), 'date does not exist'], [text('29/02/2023'), 'date does not exist'], [number(2014), 'date is only a year'], [text('soon'), 'date is not understood'], [number(-3), 'date is not understood'],
  ])('refuses %o', (cell, fault) => expect(readDate(cell, 'day_first', TODAY)).toEqual({ fault }));
});

describe('times, lengths and weekdays', () => {
  it.each([[text('6.30pm'), 1110], [text('4:45 PM'), 1005], [text('14:45'), 885], [number(0.59375), 855], [text('12 am'), 0], [text('12:15 p.m.'), 735], [text('16h30'), 990], [dateCell('1899-12-30', 855), 855]])(
    'reads %o', (cell, minute) => expect(readTime(cell)).toEqual({ value: minute }));
  it.each([[text('25:00'), 'time does not exist'], [text('13:00 pm'), 'time does not exist'], [number(1.5), 'time does not exist'], [text('after school'), 'time is not understood'], [text(''), 'time is missing']])(
    'refuses %o', (cell, fault) => expect(readTime(cell)).toEqual({ fault }));
  it('reads every minute of the day in its three forms alike', () => {
    fc.assert(fc.property(fc.integer({ min: 0, max: 1439 }), (minute) => {
      const [hour, rest] = [Math.floor(minute / 60), String(minute % 60).padStart(2, '0')];
      const half = `${hour % 12 === 0 ? 12 : hour % 12}:${rest} ${hour < 12 ? 'AM' : 'PM'}`;
      for (const cell of [text(`${hour}:${rest}`), text(half), number(minute / 1440)]) expect(readTime(cell)).toEqual({ value: minute });
    }));
  });
  it.each([[number(45), 45], [text('45 min'), 45], [text('1 h'), 60], [text('1,5 hours'), 90]])('reads the length %o', (cell, minutes) => expect(readMinutes(cell)).toEqual({ value: minutes }));
  it.each([[text('long')], [number(5)], [number(200)], [text('')]])('refuses the length %o', (cell) => expect(readMinutes(cell)).toHaveProperty('fault'));
  it.each([['Thu', 4], ['wed', 3], ['Tuesday', 2], ['Fri.', 5], ['Thurs', 4], ['Mondays', 1]])('reads the day %s', (typed, day) => expect(readWeekday(text(typed))).toEqual({ value: day }));
  it.each([['Mo day'], ['T'], ['Frog']])('refuses the day %s', (typed) => expect(readWeekday(text(typed))).toHaveProperty('fault'));
  it.each([['Mon-Fri', [1, 2, 3, 4, 5]], ['Tue–Sat', [2, 3, 4, 5, 6]], ['Mon, Tue, Thu', [1, 2, 4]], ['Mon Wed Fri', [1, 3, 5]], ['Sat to Mon', [1, 6, 7]], ['', []]])(
    'reads the days %s', (typed, days) => expect(readWeekdays(text(typed))).toEqual({ value: days }));
});

describe('amounts', () => {
  it.each([[text('€18,50'), 1850], [text('26.00'), 2600], [number(40.5), 4050], [number(0.1 + 0.2), 30], [text('EUR 1 234,50'), 123_450], [text(''), null]])(
    'reads %o', (cell, minor) => expect(readMoney(cell, 'EUR')).toEqual({ value: minor }));
  it.each([[text('a lot')], [number(1.234)], [number(-12.5)], [text('12.345,6.7')]])('refuses %o', (cell) => expect(readMoney(cell, 'EUR')).toHaveProperty('fault'));
  it.each([[number(25), 2500], [number(0.25, true), 2500], [text('33,5 %'), 3350], [number(0), 0], [number(100), 10_000]])('reads the share %o', (cell, bp) => expect(readShare(cell)).toEqual({ value: bp }));
  it.each([[number(130)], [number(-1)]])('refuses the share %o', (cell) => expect(readShare(cell)).toEqual({ fault: 'share must lie between 0 and 100 %' }));
  it('reads levels and seats as whole numbers only', () => {
    expect(readLevel(text('Level 3'))).toEqual({ value: 3 });
    for (const cell of [text('advanced'), number(0), number(2.5), number(99)]) expect(readLevel(cell)).toEqual({ fault: 'level is not a number of a level' });
    expect(readSeats(text('80'))).toEqual({ value: 80 });
    expect(readSeats(text('many'))).toHaveProperty('fault');
  });
});

describe('answers, addresses, equipment', () => {
  it('keeps "not asked" apart from no', () => {
    expect([text('yes'), text('Y'), text('N'), text('no'), text('')].map(readAnswer)).toEqual([{ value: 'yes' }, { value: 'yes' }, { value: 'no' }, { value: 'no' }, { value: null }]);
    expect(readAnswer(text('perhaps'))).toHaveProperty('fault');
  });
  it('keeps a phone as typed and compares by its digits', () => {
    expect(readPhone(text('+44 (0)155-010-0100'), 'payer')).toEqual({ value: '+44 (0)155-010-0100' });
    expect(phoneKey('+44 (0)155-010-0100')).toBe(phoneKey('0155 010 0100'));
  });
  it('lowers an address and refuses what could be two', () => {
    expect(readEmail(text(' ELIF.8@EXAMPLE.COM\u00a0'), 'payer')).toEqual({ value: 'elif.8@example.com' });
    for (const typed of ['not an address', 'a@example.com,b@example.com', 'a@example']) expect(readEmail(text(typed), 'payer')).toEqual({ fault: 'payer e-mail is not an address' });
  });
  it('reads equipment with its number', () => {
    expect(readFeatures(text('two digital pianos; PA'))).toEqual([{ code: 'digital_piano', label: 'digital piano', quantity: 2 }, { code: 'pa', label: 'PA', quantity: 1 }]);
    expect(readFeatures(text('grand piano')).map(({ code }) => code)).toEqual(['grand_piano', 'acoustic_piano']);
    expect(readFeatures(text('3 music stands, harp'))).toEqual([{ code: 'music_stands', label: 'music stands', quantity: 3 }, { code: 'harp', label: 'harp', quantity: 1 }]);
  });
});
