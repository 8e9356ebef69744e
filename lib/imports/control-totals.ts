import { fieldsOf, type SheetMapping } from './mapping';
import { readMoney } from './amounts';
import type { Sheet } from './cell';
import { SHEET_KINDS } from './columns';
import type { CheckedRow, Verdict } from './rows';

/** One sheet's count: `rows` that hold anything = `good` + `problems`; blank lines are counted apart. */
export type SheetTotals = { sheet: string; rows: number; good: number; problems: number; blanks: number; byVerdict: Record<Verdict, number> };
/** The sum of a column over all rows, and over those that come in and those that do not: the two add up to the first. */
export type PriceTotals = { allMinor: number; goodMinor: number; problemMinor: number };

const isGood = ({ verdict }: CheckedRow): boolean => verdict === 'new' || verdict === 'same' || verdict === 'changed';
export const isProblem = ({ verdict }: Pick<CheckedRow, 'verdict'>): boolean => verdict === 'faulty' || verdict === 'duplicate';

/** Rows in = rows imported + rows left out + blank lines, sheet by sheet: nothing is lost unseen (job map B21, S40). */
export function controlTotals(rows: readonly CheckedRow[]): SheetTotals[] {
  const names = [...new Set([...rows].sort((a, b) => SHEET_KINDS.indexOf(a.kind) - SHEET_KINDS.indexOf(b.kind)).map(({ sheet }) => sheet))];
  return names.map((sheet) => {
    const own = rows.filter((row) => row.sheet === sheet);
    const byVerdict = { new: 0, same: 0, changed: 0, duplicate: 0, faulty: 0, blank: 0 };
    for (const { verdict } of own) byVerdict[verdict] += 1;
    return { sheet, rows: own.length - byVerdict.blank, good: own.filter(isGood).length, problems: own.filter(isProblem).length, blanks: byVerdict.blank, byVerdict };
  });
}

/** The prices of a sheet of enrolments; a price that cannot be read is in neither sum. */
export function priceTotals(rows: readonly CheckedRow[], sheets: readonly Sheet[], mapping: readonly SheetMapping[], currency: string): PriceTotals {
  const totals = { allMinor: 0, goodMinor: 0, problemMinor: 0 };
  for (const row of rows.filter(({ kind, verdict }) => kind === 'enrolments' && verdict !== 'blank')) {
    const source = sheets.find(({ name }) => name === row.sheet)?.rows.find(({ rowNo }) => rowNo === row.rowNo);
    const one = mapping.find(({ sheet }) => sheet === row.sheet);
    const price = source && one ? readMoney(fieldsOf(source, one)('price'), currency) : null;
    const amountMinor = price && 'value' in price ? (price.value ?? 0) : 0;
    totals.allMinor += amountMinor;
    if (isGood(row)) totals.goodMinor += amountMinor;
    else totals.problemMinor += amountMinor;
  }
  return totals;
}
