import 'server-only';
import ExcelJS from 'exceljs';
import { minorDigitsOf, plainAmount } from '@/lib/money';
import { safeText, type Cell } from './cells';

export type SheetColumn = { header: string; width?: number };
export type WorkbookSheet = { name: string; title: string; columns: readonly SheetColumn[]; rows: readonly (readonly Cell[])[]; totals?: readonly (readonly Cell[])[] };
export type Workbook = { currency: string; madeAt: number; sheets: readonly WorkbookSheet[] };

const FORBIDDEN = /[[\]:*?/\\]/g;
const NAME_LIMIT = 31;

/** Sheet names are short, unique and without the signs that a spreadsheet refuses. */
function sheetNames(names: readonly string[]): string[] {
  const taken = new Set<string>();
  return names.map((name) => {
    const base = name.replace(FORBIDDEN, ' ').replace(/^'+|'+$/g, '').trim() || 'Sheet';
    let candidate = base.slice(0, NAME_LIMIT);
    for (let copy = 2; taken.has(candidate.toLowerCase()); copy += 1) candidate = `${base.slice(0, NAME_LIMIT - String(copy).length - 1)} ${copy}`;
    taken.add(candidate.toLowerCase());
    return candidate;
  });
}

/** A workbook of plain values: strings, numbers and dates at midnight UTC, no formulas. */
export async function workbookFile({ currency, madeAt, sheets }: Workbook): Promise<Buffer> {
  const book = new ExcelJS.Workbook();
  book.created = new Date(madeAt * 1000);
  book.modified = book.created;
  const names = sheetNames(sheets.map(({ name }) => name));
  for (const [index, sheet] of sheets.entries()) addSheet(book, names[index] ?? 'Sheet', sheet, currency);
  return Buffer.from(await book.xlsx.writeBuffer());
}

function addSheet(book: ExcelJS.Workbook, name: string, { title, columns, rows, totals }: WorkbookSheet, currency: string): void {
  const sheet = book.addWorksheet(name, { views: [{ state: 'frozen', ySplit: 3 }] });
  sheet.addRow([safeText(title)]).font = { bold: true, size: 14 };
  sheet.addRow([]);
  sheet.addRow(columns.map(({ header }) => safeText(header))).font = { bold: true };
  for (const row of rows) addCells(sheet.addRow([]), row, currency);
  for (const total of totals ?? []) {
    const last = sheet.addRow([]);
    addCells(last, total, currency);
    last.font = { bold: true };
  }
  columns.forEach(({ width }, index) => { sheet.getColumn(index + 1).width = width ?? 14; });
}

function moneyFormatOf(currency: string): string {
  const digits = minorDigitsOf(currency);
  return digits === 0 ? '#,##0' : `#,##0.${'0'.repeat(digits)}`;
}

function addCells(row: ExcelJS.Row, cells: readonly Cell[], currency: string): void {
  cells.forEach((cell, index) => {
    const target = row.getCell(index + 1);
    if (cell === null) return;
    if (typeof cell === 'string') target.value = safeText(cell);
    else if (typeof cell === 'number') target.value = cell;
    else if ('date' in cell) {
      target.value = new Date(`${cell.date}T00:00:00Z`);
      target.numFmt = 'yyyy-mm-dd';
    } else {
      target.value = Number(plainAmount(cell.amountMinor, cell.currency ?? currency));
      target.numFmt = moneyFormatOf(cell.currency ?? currency);
    }
  });
}
