import 'server-only';
import { recordAudit } from '@/db/audit';
import { transaction } from '@/db/transaction';
import { formatDate, plural } from '@/lib/format';
import { sumOf } from '@/lib/money';
import type { Context } from '@/lib/server/context';
import type { FileKind } from '../lists';
import type { Cell } from './cells';
import { csvFile } from './csv';
import { download } from './download';
import { workbookFile, type SheetColumn } from './workbook';

export type ListColumn = SheetColumn & { /** Its amounts are added up below the list. */ isSummed?: boolean };
/**
 * A list on its way out. Its columns are named one by one and never copied from a record, so that a note about a child, a
 * health mark or a mark of a hearing cannot slip in (job map AC-9).
 */
export type TakenList = {
  /** "students": stands in the file’s name and in the audit. */ name: string;
  tableName: string; rowId: string; columns: readonly ListColumn[]; rows: readonly (readonly Cell[])[];
};

/**
 * A list as a file: a workbook with a title, the number of rows and the sum of its amounts, or comma-separated text with one row
 * of headers and nothing else, for programs. Who took it, how many rows and which columns is written down before it is handed over.
 */
export async function listFile(list: TakenList, as: FileKind, context: Context): Promise<Response> {
  const { school, today, now } = context;
  const content = as === 'csv' ? csvFile(list.columns.map(({ header }) => header), list.rows, school.currency) : await workbookFile({ currency: school.currency, madeAt: now, sheets: [sheetOf(list, context)] });
  await transaction(context.db, (trx) => recordAudit(trx, context, {
    action: 'export', tableName: list.tableName, rowId: list.rowId, sentence: `Took the list of ${list.name}: ${plural(list.rows.length, 'row')}.`,
    after: { as, rows: list.rows.length, columns: list.columns.map(({ header }) => header) },
  }));
  return download(content, `${list.name} ${today}`, as);
}

const capitalised = (words: string) => words.charAt(0).toUpperCase() + words.slice(1);

const sheetOf = ({ name, columns, rows }: TakenList, { school, today }: Context) => ({
  name: capitalised(name), title: `${capitalised(name)}, ${formatDate(today, school.locale, 'full')}: ${plural(rows.length, 'row')}`, columns, rows, totals: totalsOf(columns, rows, school.currency),
});

/** A line of sums for each currency: amounts of two currencies are never added together. */
function totalsOf(columns: readonly ListColumn[], rows: readonly (readonly Cell[])[], schoolCurrency: string): Cell[][] {
  const summed = columns.map(({ isSummed = false }, index) => ({ isSummed, amounts: isSummed ? rows.flatMap((row) => amountOf(row[index], schoolCurrency)) : [] }));
  const currencies = [...new Set(summed.flatMap(({ amounts }) => amounts.map(({ currency }) => currency)))].sort();
  return currencies.map((currency) => summed.map(({ isSummed, amounts }, index): Cell => {
    if (isSummed) return { currency, amountMinor: sumOf(amounts.filter((amount) => amount.currency === currency).map(({ amountMinor }) => amountMinor)) };
    return index === 0 ? `Total ${currency}` : null;
  }));
}

function amountOf(cell: Cell | undefined, schoolCurrency: string): { amountMinor: number; currency: string }[] {
  if (typeof cell !== 'object' || cell === null || 'date' in cell) return [];
  return [{ amountMinor: cell.amountMinor, currency: cell.currency ?? schoolCurrency }];
}
