import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { formatDate, formatInstant, formatMoney, formatTimeRange, listOf, plural } from './format';
import { parseMoney } from './money';
import { addDays, instantOf } from './time';

const IRISH = { locale: 'en-IE', zone: 'Europe/Dublin' };

describe('dates', () => {
  it.each([
    ['day', 'Tuesday 17 November'], ['short', 'Tue 17 Nov'], ['plain', '17 Nov'], ['full', '17 November 2026'], ['month', 'November 2026'], ['weekday', 'Tue'],
  ] as const)('%s', (style, text) => expect(formatDate('2026-11-17', 'en-IE', style)).toBe(text));
  it('the date that is shown is the date that was given, wherever the program runs', () => {
    fc.assert(fc.property(fc.integer({ min: 0, max: 4000 }), (days) => {
      const date = addDays('2020-01-01', days);
      expect(formatDate(date, 'en-IE')).toMatch(new RegExp(`^${Number(date.slice(8))} `));
    }));
  });
  it('other languages', () => {
    expect(formatDate('2026-11-17', 'de-DE', 'full')).toBe('17. November 2026');
    expect(formatDate('2026-11-17', 'fr-FR', 'full')).toBe('17 novembre 2026');
  });
  it('an instant is told in the school’s zone', () => {
    const at = instantOf('2026-11-17', 965, 'Europe/Dublin');
    expect(formatInstant(at, IRISH)).toMatch(/Tue,? 17 Nov,? 16:05/);
    expect(formatInstant(at, { locale: 'en-IE', zone: 'Asia/Tokyo' })).toMatch(/Wed,? 18 Nov,? 01:05/);
  });
  it('midnight is 00, not 24', () => expect(formatInstant(instantOf('2026-11-17', 0, 'Europe/Dublin'), IRISH)).toMatch(/00:00$/));
  it('times of a lesson, also past midnight', () => {
    expect([formatTimeRange(965, 45), formatTimeRange(1410, 60)]).toEqual(['16:05–16:50', '23:30–00:30']);
  });
});

describe('money', () => {
  it.each([
    [123_450, 'EUR', 'en-IE', '€1,234.50'], [-5, 'EUR', 'en-IE', '-€0.05'], [-123_450, 'EUR', 'en-IE', '-€1,234.50'], [0, 'EUR', 'en-IE', '€0.00'], [1200, 'JPY', 'en-US', '¥1,200'], [4_200, 'USD', 'en-US', '$42.00'],
  ])('%i %s in %s', (amountMinor, currency, locale, text) => expect(formatMoney({ amountMinor, currency }, locale)).toBe(text));
  it('what is shown is read back as the same amount', () => {
    fc.assert(fc.property(fc.integer({ min: -900_000_000, max: 900_000_000 }), fc.constantFrom('EUR', 'USD', 'GBP'), (amountMinor, currency) => {
      const shown = formatMoney({ amountMinor, currency }, 'en-IE');
      const unsigned = parseMoney(shown.replace('-', ''), currency);
      expect(unsigned).toBe(Math.abs(amountMinor));
      expect(shown.includes('-')).toBe(amountMinor < 0);
    }));
  });
  it('a large amount keeps its last cent', () => expect(formatMoney({ amountMinor: 9_007_199_254_740_991, currency: 'EUR' }, 'en-IE')).toBe('€90,071,992,547,409.91'));
});

describe('words', () => {
  it('counts', () => expect([plural(1, 'lesson'), plural(0, 'lesson'), plural(2, 'family', 'families')]).toEqual(['1 lesson', '0 lessons', '2 families']));
  it('lists', () => expect([listOf(['Inés'], 'en-IE'), listOf(['Inés', 'Zoë', 'O’Shea'], 'en-IE')]).toEqual(['Inés', 'Inés, Zoë and O’Shea']));
});
