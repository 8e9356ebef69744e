import { addDays, isLocalDate, type LocalDate } from '../time';
import { typedText, type Cell } from './cell';
import { faulty, read, type Reading } from './reading';

export type DateOrder = 'day_first' | 'month_first';

const NUMBERS = /^(\d{1,2})[/.\- ](\d{1,2})[/.\- ](\d{2}|\d{4})$/;
const ISO = /^(\d{4})-(\d{1,2})-(\d{1,2})(?:[T ].*)?$/;
const DAY_MONTH_NAME = /^(\d{1,2})(?:st|nd|rd|th)?[ .-]+([a-z]{3,9})\.?[ ,.-]+(\d{2}|\d{4})$/i;
const MONTH_NAME_DAY = /^([a-z]{3,9})\.?[ ]+(\d{1,2})(?:st|nd|rd|th)?,?[ ]+(\d{2}|\d{4})$/i;
const MONTHS = ['jan', 'feb', 'mar', 'apr', 'may', 'jun', 'jul', 'aug', 'sep', 'oct', 'nov', 'dec'];

/** A workbook counts days from here (its 1900 system, with the leap day of 1900 that never was). */
const DAY_ZERO = '1899-12-30';
const LAST_SERIAL = 2_958_465;

/**
 * Whether a column writes the day or the month first. Decided once for the whole column by any cell that can only
 * be one of the two (13/02/2014), never cell by cell. Null when nothing decides or the cells contradict each other.
 */
export function dateOrderOf(column: readonly Cell[]): DateOrder | null {
  const votes = new Set<DateOrder>();
  for (const cell of column) {
    const [first, second] = numbersOf(cell);
    if (first > 12) votes.add('day_first');
    else if (second > 12) votes.add('month_first');
  }
  return votes.size === 1 ? ([...votes][0] ?? null) : null;
}

/** Whether the column has a cell that reads differently by day first and month first. */
export const needsDateOrder = (column: readonly Cell[]): boolean =>
  column.some((cell) => {
    const [first, second] = numbersOf(cell);
    return first > 0 && first <= 12 && second <= 12 && first !== second;
  });

function numbersOf(cell: Cell): [number, number] {
  const match = cell.kind === 'text' ? NUMBERS.exec(typedText(cell)) : null;
  return match ? [Number(match[1]), Number(match[2])] : [0, 0];
}

/** Reads a date: a date cell, a serial number, "2014-04-17", "21/05/2012" by the column's order, "17 Apr 2014". Blank is null. */
export function readDate(cell: Cell, order: DateOrder | null, today: LocalDate): Reading<LocalDate | null> {
  if (cell.kind === 'date') return read(cell.date);
  if (cell.kind === 'number') return readSerial(cell.value);
  const text = typedText(cell);
  if (text === '') return read(null);
  const iso = ISO.exec(text);
  if (iso) return existing(Number(iso[1]), Number(iso[2]), Number(iso[3]));
  return readNumbers(text, order, today) ?? readNamedMonth(text, today) ?? faulty('date is not understood');
}

function readSerial(value: number): Reading<LocalDate> {
  if (!Number.isInteger(value) || value < 1 || value > LAST_SERIAL) return faulty('date is not understood');
  // 2014 alone would be a day of July 1905 as a serial number; it is a year that lacks its day.
  if (value >= 1900 && value <= 2100) return faulty('date is only a year');
  return read(addDays(DAY_ZERO, value));
}

function readNumbers(text: string, order: DateOrder | null, today: LocalDate): Reading<LocalDate> | null {
  const match = NUMBERS.exec(text);
  if (!match) return null;
  const [first, second, year] = [Number(match[1]), Number(match[2]), fullYear(match[3] ?? '', today)];
  if (order === null && first !== second && first <= 12 && second <= 12) return faulty('day or month first is not decided');
  return order === 'month_first' ? existing(year, first, second) : existing(year, second, first);
}

function readNamedMonth(text: string, today: LocalDate): Reading<LocalDate> | null {
  const dayFirst = DAY_MONTH_NAME.exec(text);
  const monthFirst = MONTH_NAME_DAY.exec(text);
  const [day, name, year] = dayFirst ? [dayFirst[1], dayFirst[2], dayFirst[3]] : monthFirst ? [monthFirst[2], monthFirst[1], monthFirst[3]] : [];
  const month = MONTHS.indexOf((name ?? '').slice(0, 3).toLowerCase()) + 1;
  return month === 0 ? null : existing(fullYear(year ?? '', today), month, Number(day));
}

/** Two digits mean this century up to this year, and the last one after it. */
function fullYear(digits: string, today: LocalDate): number {
  if (digits.length !== 2) return Number(digits);
  const century = Number(today.slice(0, 2)) * 100;
  const year = century + Number(digits);
  return year > Number(today.slice(0, 4)) ? year - 100 : year;
}

function existing(year: number, month: number, day: number): Reading<LocalDate> {
  const date = [String(year).padStart(4, '0'), String(month).padStart(2, '0'), String(day).padStart(2, '0')].join('-');
  return isLocalDate(date) ? read(date) : faulty('date does not exist');
}
