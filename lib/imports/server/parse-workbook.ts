import 'server-only';
import ExcelJs, { type CellValue, type Cell as ExcelCell } from 'exceljs';
import { AppError } from '@/lib/errors';
import { BLANK, type Cell, type Sheet } from '../cell';
import { assertSafeWorkbook, assertUnpacksSafely } from './zip-directory';

const MOST_ROWS = 5000;
const MOST_COLUMNS = 60;
const LONGEST_TEXT = 2000;

/** Reads a workbook into plain cells. Formulas count as the value they were saved with; they are never run. */
export async function parseWorkbook(bytes: Buffer, fileName: string): Promise<Sheet[]> {
  assertSafeWorkbook(bytes, fileName);
  assertUnpacksSafely(bytes);
  const book = new ExcelJs.Workbook();
  try {
    // The library's own type predates the generic Buffer of newer Node types.
    await book.xlsx.load(bytes as unknown as Parameters<typeof book.xlsx.load>[0]);
  } catch {
    throw new AppError('invalid', 'This workbook cannot be read. Open it in your spreadsheet program, save it again as .xlsx, and choose it again.');
  }
  return book.worksheets.map((sheet) => ({ name: sheet.name, rows: rowsOf(sheet) }));
}

function rowsOf(sheet: ExcelJs.Worksheet): Sheet['rows'] {
  if (sheet.rowCount > MOST_ROWS) throw new AppError('invalid', `The sheet ${sheet.name} has more than ${MOST_ROWS} rows. Split it, and bring in one part after the other.`);
  const width = Math.min(sheet.columnCount, MOST_COLUMNS);
  return Array.from({ length: sheet.rowCount }, (_, index) => {
    const row = sheet.getRow(index + 1);
    return { rowNo: index + 1, cells: Array.from({ length: width }, (_cell, place) => cellOf(row.getCell(place + 1))) };
  });
}

const cellOf = (cell: ExcelCell): Cell => valueOf(cell.value, (cell.numFmt ?? '').includes('%'));

function valueOf(value: CellValue, isPercent: boolean): Cell {
  if (value === null || value === undefined) return BLANK;
  if (typeof value === 'string') return textCell(value);
  if (typeof value === 'number') return { kind: 'number', value, isPercent };
  if (typeof value === 'boolean') return textCell(value ? 'yes' : 'no');
  if (value instanceof Date) return dateCell(value);
  return valueOfObject(value, isPercent);
}

function valueOfObject(value: object, isPercent: boolean): Cell {
  if ('result' in value && value.result !== undefined && !isPlainFormula(value.result)) return valueOf(value.result as CellValue, isPercent);
  if ('richText' in value && Array.isArray(value.richText)) return textCell((value.richText as { text: string }[]).map(({ text }) => text).join(''));
  if ('text' in value) return valueOf(value.text as CellValue, isPercent);
  if ('error' in value) return textCell(String(value.error));
  // A formula that was never worked out has no value to bring in; its presence must not read as a blank.
  return 'formula' in value || 'sharedFormula' in value ? textCell('#formula without a saved value') : BLANK;
}

const isPlainFormula = (result: unknown): boolean => typeof result === 'object' && result !== null && 'formula' in result;

const textCell = (text: string): Cell => ({ kind: 'text', text: text.slice(0, LONGEST_TEXT) });

/** A workbook's dates carry no zone; the library hands them over as if they were in Greenwich. */
function dateCell(value: Date): Cell {
  if (Number.isNaN(value.getTime())) return textCell('#date');
  const rounded = new Date(Math.round(value.getTime() / 60_000) * 60_000);
  return { kind: 'date', date: rounded.toISOString().slice(0, 10), minute: rounded.getUTCHours() * 60 + rounded.getUTCMinutes() };
}
