import 'server-only';
import { plainAmount } from '@/lib/money';

/** What reaches a cell: text, a whole number, an amount, a date. Never a formula. An amount without a currency of its own is in the file’s. */
export type Cell = string | number | null | { amountMinor: number; currency?: string } | { date: string };

/**
 * Text that a spreadsheet would run as a formula gets a leading apostrophe (OWASP, CSV injection): text that begins
 * with = + - @, a tab or a line break. Numbers stay numbers.
 */
export const safeText = (text: string): string => (/^[=+\-@\t\r\n]/.test(text) ? `'${text}` : text);

/** One cell as comma-separated files write it. */
export function plainCell(cell: Cell, currency: string): string | number {
  if (cell === null) return '';
  if (typeof cell === 'string') return safeText(cell);
  if (typeof cell === 'number') return cell;
  return 'date' in cell ? cell.date : plainAmount(cell.amountMinor, cell.currency ?? currency);
}
