import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { divideRounded, minorDigitsOf, parseMoney, percentOf, plainAmount, ratioOf, splitByWeights, sumOf } from './money';

const amount = fc.integer({ min: -2_000_000_000, max: 2_000_000_000 });
const currency = fc.constantFrom('EUR', 'USD', 'JPY', 'KWD');
const weights = fc.array(fc.integer({ min: 0, max: 10_000 }), { minLength: 1, maxLength: 12 }).filter((list) => list.some((weight) => weight > 0));

describe('rounding', () => {
  it('is half away from zero, with either sign on either side', () => {
    expect([divideRounded(1, 2), divideRounded(-1, 2), divideRounded(1, -2), divideRounded(-1, -2)]).toEqual([1, -1, -1, 1]);
    expect([divideRounded(4875, 2), divideRounded(4874, 3), divideRounded(0, 7)]).toEqual([2438, 1625, 0]);
  });
  it('never lies more than half a unit from the exact quotient', () => {
    fc.assert(fc.property(amount, fc.integer({ min: -9999, max: 9999 }).filter((divisor) => divisor !== 0), (numerator, denominator) => {
      const off = 2n * (BigInt(divideRounded(numerator, denominator)) * BigInt(denominator) - BigInt(numerator));
      const bound = BigInt(Math.abs(denominator));
      expect(off <= bound && off >= -bound).toBe(true);
    }));
  });
  it('a mirrored amount rounds to the mirrored answer', () => {
    fc.assert(fc.property(amount, fc.integer({ min: 0, max: 20_000 }), (amountMinor, basisPoints) => {
      expect(percentOf(-amountMinor, basisPoints) + percentOf(amountMinor, basisPoints)).toBe(0);
    }));
  });
  it('stays exact where a product leaves the safe whole numbers', () => {
    expect(ratioOf(9_000_000_000_000_000, 9_999, 10_000)).toBe(8_999_100_000_000_000);
    expect(ratioOf(700, -1, 2)).toBe(-350);
  });
  it.each([() => divideRounded(1, 0), () => ratioOf(1, 1, 0), () => divideRounded(0.5, 1), () => percentOf(Number.NaN, 1)])('refuses what is not a whole amount or has no answer', (attempt) => {
    expect(attempt).toThrow(RangeError);
  });
});

describe('splitting', () => {
  it('the parts are the whole, within one unit of the exact part, and of its sign', () => {
    fc.assert(fc.property(amount, weights, (totalMinor, list) => {
      const parts = splitByWeights(totalMinor, list);
      const sum = BigInt(sumOf(list));
      expect(sumOf(parts)).toBe(totalMinor);
      for (const [index, part] of parts.entries()) {
        const off = BigInt(part) * sum - BigInt(totalMinor) * BigInt(list[index] ?? 0);
        expect(off < sum && off > -sum).toBe(true);
        expect(part === 0 || Math.sign(part) === Math.sign(totalMinor)).toBe(true);
      }
    }));
  });
  it('a negative total mirrors the positive one', () => {
    fc.assert(fc.property(amount, weights, (totalMinor, list) => {
      expect(splitByWeights(-totalMinor, list).map((part, index) => part + (splitByWeights(totalMinor, list)[index] ?? 0))).toEqual(list.map(() => 0));
    }));
  });
  it('who weighs nothing gets nothing', () => {
    fc.assert(fc.property(amount, weights, (totalMinor, list) => {
      expect(splitByWeights(totalMinor, [...list, 0]).at(-1)).toBe(0);
    }));
  });
  it.each([[[]], [[0, 0]], [[1, -1]], [[0.5, 0.5]]])('refuses weights %j', (list) => expect(() => splitByWeights(100, list)).toThrow(RangeError));
});

describe('reading and writing an amount', () => {
  it('what was written is read back, with a decimal point or a decimal comma', () => {
    fc.assert(fc.property(amount, currency, (amountMinor, code) => {
      const written = plainAmount(amountMinor, code);
      expect(parseMoney(written, code)).toBe(amountMinor);
      if (minorDigitsOf(code) > 0) expect(parseMoney(written.replace('.', ','), code)).toBe(amountMinor);
    }));
  });
  it.each([
    ['12,50', 1250], ['12.50', 1250], ['€ 12.5', 1250], ['1 234,56', 123_456], ['1,234.56', 123_456], ['1.234,56', 123_456], ['1’234.56', 123_456], ['-3', -300], ['+3', 300], ['.5', 50], ['0', 0], ['1.005', 100_500], ['1,234', 123_400],
  ])('reads “%s”', (typed, amountMinor) => expect(parseMoney(typed, 'EUR')).toBe(amountMinor));
  it.each(['', ' ', 'free', '12.345,6.7', '1,23,456.00', '12-50', '--3', '12.3456', '1e3', '9'.repeat(20)])('does not guess at “%s”', (typed) => expect(parseMoney(typed, 'EUR')).toBeNull());
  it('an amount is a whole safe number or nothing, whatever was typed', () => {
    fc.assert(fc.property(fc.string({ unit: 'grapheme', maxLength: 24 }), currency, (typed, code) => {
      const read = parseMoney(typed, code);
      expect(read === null || Number.isSafeInteger(read)).toBe(true);
    }));
  });
  it.each([['EUR', 5, '0.05'], ['EUR', -5, '-0.05'], ['JPY', -1200, '-1200'], ['KWD', 1, '0.001'], ['USD', 0, '0.00']])('writes %s %i as %s', (code, amountMinor, text) => expect(plainAmount(amountMinor, code)).toBe(text));
});
