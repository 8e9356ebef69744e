import { minorDigitsOf, parseMoney } from '../money';
import { typedText, type Cell } from './cell';
import { faulty, read, type Reading } from './reading';

/**
 * Reads an amount: 27, "26.00", "€18,50", "EUR 1 234.50", or the saved value of a formula. A calculated number may
 * carry the dust of binary fractions below a thousandth; more than that is not an amount. Blank is null.
 */
export function readMoney(cell: Cell, currency: string): Reading<number | null> {
  const text = cell.kind === 'number' ? plainNumber(cell.value, minorDigitsOf(currency)) : typedText(cell);
  if (text === '') return read(null);
  const amountMinor = text === null || cell.kind === 'date' ? null : parseMoney(text, currency);
  if (amountMinor === null) return faulty('amount is not understood');
  return amountMinor < 0 ? faulty('amount must not be negative') : read(amountMinor);
}

function plainNumber(value: number, digits: number): string | null {
  const text = value.toFixed(digits);
  return Math.abs(Number(text) - value) < 0.0005 ? text : null;
}

/** A share of 100 % in basis points: 25, "25 %", "12,5", or a cell formatted as a percentage. Blank is null. */
export function readShare(cell: Cell): Reading<number | null> {
  const text = typedText(cell).replace(/ ?%$/, '').replace(',', '.');
  if (text === '') return read(null);
  const bp = /^-?\d+(\.\d{1,2})?$/.test(text) ? Math.round(Number(text) * 100) : null;
  if (bp === null) return faulty('share is not a percentage');
  return bp >= 0 && bp <= 10_000 ? read(bp) : faulty('share must lie between 0 and 100 %');
}

/** Levels are counted from 1; no ladder is taller than this. */
const TOP_LEVEL = 20;

/** The number of a level: 3, "3", "Level 3". Blank is null. */
export function readLevel(cell: Cell): Reading<number | null> {
  const text = typedText(cell).replace(/^level /i, '');
  if (text === '') return read(null);
  const level = /^\d{1,2}(\.0+)?$/.test(text) ? Number(text) : 0;
  return level >= 1 && level <= TOP_LEVEL ? read(level) : faulty('level is not a number of a level');
}

/** How many people fit: a whole number from 1. */
export function readSeats(cell: Cell): Reading<number> {
  const text = typedText(cell).replace(/ ?(seats?|people|persons?)$/i, '');
  const seats = /^\d{1,4}$/.test(text) ? Number(text) : 0;
  return seats > 0 ? read(seats) : faulty('seats is not a number of people');
}
