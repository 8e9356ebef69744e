/**
 * Money is a whole number of minor units (cents) and a currency code, never a float.
 * Names of amounts end in `Minor`. Rounding is half away from zero, once per line; a split always
 * adds up to what was split (largest remainder). House rules "Money" and "Rounding" of the job map.
 */
export type Money = { amountMinor: number; currency: string };

/** Decimals per currency where ISO 4217 does not say 2. `Intl` differs from ISO for several, so it is not asked. */
const MINOR_DIGITS: Record<string, number> = {
  JPY: 0, KRW: 0, ISK: 0, CLP: 0, VND: 0, XAF: 0, XOF: 0, XPF: 0, PYG: 0, RWF: 0, UGX: 0,
  KWD: 3, BHD: 3, JOD: 3, OMR: 3, TND: 3, LYD: 3, IQD: 3,
};

export const minorDigitsOf = (currency: string): number => MINOR_DIGITS[currency] ?? 2;

export function assertMinor(amountMinor: number): void {
  if (!Number.isSafeInteger(amountMinor)) throw new RangeError(`not a whole number of minor units: ${amountMinor}`);
}

/** numerator / denominator in whole units, half away from zero: 24.375 → 24.38, −0.5 → −1. Integers only, so no binary fractions. */
export function divideRounded(numerator: number, denominator: number): number {
  assertMinor(numerator);
  assertMinor(denominator);
  if (denominator === 0) throw new RangeError('division by zero');
  const n = BigInt(numerator) * (denominator < 0 ? -1n : 1n);
  const d = BigInt(Math.abs(denominator));
  const magnitude = ((n < 0n ? -n : n) * 2n + d) / (d * 2n);
  return Number(n < 0n ? -magnitude : magnitude);
}

/** `amountMinor × numerator ÷ denominator`, rounded once, exact in between. */
export function ratioOf(amountMinor: number, numerator: number, denominator: number): number {
  assertMinor(amountMinor);
  const product = BigInt(amountMinor) * BigInt(numerator);
  const positive = denominator < 0 ? -product : product;
  const d = BigInt(Math.abs(denominator));
  if (d === 0n) throw new RangeError('division by zero');
  const magnitude = ((positive < 0n ? -positive : positive) * 2n + d) / (d * 2n);
  return Number(positive < 0n ? -magnitude : magnitude);
}

export const BASIS_POINTS = 10_000;

/** A percentage in basis points (10 % = 1000) of an amount. */
export const percentOf = (amountMinor: number, basisPoints: number): number =>
  ratioOf(amountMinor, basisPoints, BASIS_POINTS);

/**
 * Splits a total by whole-number weights with the largest-remainder rule: every share is cut down to
 * whole units, the units left over go to the largest fractions, ties to the earlier in the list.
 * The parts always add up to the total; a negative total mirrors the positive one.
 */
export function splitByWeights(totalMinor: number, weights: readonly number[]): number[] {
  assertMinor(totalMinor);
  const sum = weights.reduce((total, weight) => total + weight, 0);
  if (sum <= 0 || weights.some((weight) => !Number.isSafeInteger(weight) || weight < 0)) {
    throw new RangeError('weights must be whole, not negative, and not all zero');
  }
  const sign = totalMinor < 0 ? -1 : 1;
  const total = BigInt(Math.abs(totalMinor));
  const parts = weights.map((weight, index) => {
    const exact = total * BigInt(weight);
    return { index, units: exact / BigInt(sum), remainder: exact % BigInt(sum) };
  });
  let left = Number(total - parts.reduce((units, part) => units + part.units, 0n));
  const byRemainder = [...parts].sort((a, b) => Number(b.remainder - a.remainder) || a.index - b.index);
  for (const part of byRemainder) {
    if (left === 0) break;
    part.units += 1n;
    left -= 1;
  }
  return parts.map((part) => (part.units === 0n ? 0 : sign * Number(part.units)));
}

export const sumOf = (amounts: readonly number[]): number => amounts.reduce((total, amount) => total + amount, 0);

/**
 * Reads what a person typed: "12,50", "12.50", "€1 234,56", "1,234.56". Digits only are read, the value
 * is never multiplied as a float. Returns null when it is not an amount of this currency.
 */
export function parseMoney(typed: string, currency: string): number | null {
  const digits = minorDigitsOf(currency);
  const text = typed.replace(/[\s\u00a0\u202f'’]/g, '').replace(/^[^\d.,+-]+|[^\d.,]+$/g, '');
  const match = /^([+-]?)(\d[\d.,]*|[.,]\d+)$/.exec(text);
  if (!match) return null;
  const [whole, fraction] = splitDecimals(match[2] ?? '', digits);
  if (whole === null || fraction.length > digits) return null;
  const value = Number(`${whole || '0'}${fraction.padEnd(digits, '0')}`);
  if (!Number.isSafeInteger(value)) return null;
  return match[1] === '-' && value !== 0 ? -value : value;
}

/** "12.345" may be twelve thousand or a slip of the finger: where money is taken or promised, nobody guesses. */
export const isAmbiguousAmount = (typed: string, currency: string): boolean => minorDigitsOf(currency) < 3 && /^\D*\d{1,3}[.,]\d{3}\D*$/.test(typed);

/** The last mark is the decimal mark when 1 to `digits` digits follow it; other marks must group by three. */
function splitDecimals(text: string, digits: number): [string | null, string] {
  const last = Math.max(text.lastIndexOf('.'), text.lastIndexOf(','));
  if (last < 0) return [text, ''];
  const after = text.slice(last + 1);
  const mark = text.charAt(last);
  const isDecimal = digits > 0 && after.length > 0 && after.length <= digits && text.indexOf(mark) === last;
  const whole = isDecimal ? text.slice(0, last) : text;
  return isGrouped(whole) ? [whole.replace(/[.,]/g, ''), isDecimal ? after : ''] : [null, ''];
}

/** Digits alone, or groups of three behind one kind of mark. */
const isGrouped = (whole: string): boolean => /^\d*$/.test(whole) || /^\d{1,3}(?:(?:\.\d{3})+|(?:,\d{3})+)$/.test(whole);

/** "1234.50" without a sign for the currency: for number fields, spreadsheets and exports. */
export function plainAmount(amountMinor: number, currency: string): string {
  assertMinor(amountMinor);
  const digits = minorDigitsOf(currency);
  const text = String(Math.abs(amountMinor)).padStart(digits + 1, '0');
  const sign = amountMinor < 0 ? '-' : '';
  return digits === 0 ? `${sign}${text}` : `${sign}${text.slice(0, -digits)}.${text.slice(-digits)}`;
}
