import { tidyName } from '../people/names';
import { clockOf, type LocalDate, type MinuteOfDay } from '../time';

/** What one cell of a workbook holds, before anybody decides what it means. A formula counts as the value it was saved with. */
export type Cell =
  | { kind: 'blank' }
  | { kind: 'text'; text: string }
  | { kind: 'number'; value: number; isPercent: boolean }
  | { kind: 'date'; date: LocalDate; minute: MinuteOfDay };

export type SheetRow = { rowNo: number; cells: Cell[] };
/** Rows as they stand in the file; `rowNo` is the number a person sees at the left edge. */
export type Sheet = { name: string; rows: SheetRow[] };

export const BLANK: Cell = { kind: 'blank' };

/** The day that a workbook puts behind a time of day without a date. */
const NO_DAY = '1899-12-30';

/** How the cell reads to a person; nothing is interpreted. */
export function typedText(cell: Cell): string {
  switch (cell.kind) {
    case 'blank': return '';
    case 'text': return tidyName(cell.text);
    case 'number': return cell.isPercent ? `${roundedOff(cell.value * 100)} %` : String(cell.value);
    case 'date': return cell.date === NO_DAY ? clockOf(cell.minute) : cell.date;
  }
}

export const isBlank = (cell: Cell): boolean => typedText(cell) === '';

const roundedOff = (value: number): number => Number(value.toFixed(6));
