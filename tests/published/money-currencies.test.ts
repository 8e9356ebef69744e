import { describe, expect, it } from 'vitest';
import { formatMoney } from '@/lib/format';
import { minorDigitsOf, parseMoney, plainAmount, splitByWeights } from '@/lib/money';

/** B18: an allocation that hands out leftovers in turn answers differently from the largest remainder. Source: own arithmetic of the check list, 1.2. */
describe('B18 the leftover goes to the largest fraction, not to the first in the list', () => {
  it.each([
    [1000, [3, 3, 1], [429, 428, 143], [429, 429, 142]], [5, [1, 2, 3, 4], [1, 1, 1, 2], [0, 1, 1, 3]],
  ])('%i over %j', (totalMinor, weights, parts, inTurn) => {
    expect(splitByWeights(totalMinor, weights)).toEqual(parts);
    expect(splitByWeights(totalMinor, weights)).not.toEqual(inTurn);
  });
});

/** B22 and B23: ISO 4217. The decimals that `Intl` shows differ for several currencies and are never used. */
describe('B22 decimals of a currency', () => {
  it.each([
    ['USD', 2], ['JPY', 0], ['KRW', 0], ['ISK', 0], ['KWD', 3], ['BHD', 3], ['JOD', 3], ['OMR', 3], ['TND', 3], ['LYD', 3], ['IQD', 3],
  ])('%s has %i', (currency, digits) => {
    expect(minorDigitsOf(currency)).toBe(digits);
    expect(plainAmount(1, currency)).toBe(digits === 0 ? '1' : `0.${'1'.padStart(digits, '0')}`);
  });
});

describe('B23 where Intl says otherwise', () => {
  it.each(['HUF', 'IDR', 'COP', 'PKR', 'ALL', 'AFN'])('%s keeps the two decimals of ISO 4217', (currency) => {
    expect(minorDigitsOf(currency)).toBe(2);
    expect(formatMoney({ amountMinor: 1234, currency }, 'en-US')).toContain('12.34');
    expect(parseMoney('12.34', currency)).toBe(1234);
  });
  it('IQD keeps three', () => {
    expect(minorDigitsOf('IQD')).toBe(3);
    expect(formatMoney({ amountMinor: 1234, currency: 'IQD' }, 'en-US')).toContain('1.234');
  });
});
