import 'server-only';
import { stringify } from 'csv-stringify/sync';
import { plainCell, type Cell } from './cells';

// The library quotes only its own line ending; a lone break inside a name would begin a new row, past every guard of the cell.
const LINE_BREAK = /[\r\n]/;

/** Comma-separated (RFC 4180): UTF-8 with its mark, line breaks CRLF, decimal points, dates as 2026-11-30. The same rows give the same bytes. */
export const csvFile = (headers: readonly string[], rows: readonly (readonly Cell[])[], currency: string): string =>
  stringify([[...headers], ...rows.map((row) => row.map((cell) => plainCell(cell, currency)))], { bom: true, record_delimiter: '\r\n', quoted_match: LINE_BREAK });
