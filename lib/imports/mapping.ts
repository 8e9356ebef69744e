import { BLANK, isBlank, typedText, type Cell, type Sheet, type SheetRow } from './cell';
import { COLUMNS, SHEET_KINDS, type SheetKind } from './columns';
import { dateOrderOf, needsDateOrder, type DateOrder } from './dates';

/** Which sheet is what, where its headings stand, and which column holds which fact. Places count from 0; null is left out. */
export type SheetMapping = { sheet: string; kind: SheetKind | null; headingRow: number; places: Record<string, number | null>; dateOrder: DateOrder | null };

/** Headings may stand below a title or an empty line. */
const HEADING_SEARCH_ROWS = 10;

const headingKey = (cell: Cell): string => typedText(cell).toLowerCase().normalize('NFD').replace(/%/g, '').replace(/[^\p{L}\p{N}]/gu, '');

/** The reading of a workbook that its own sheet names and headings suggest; a person may change it in the preview. */
export const suggestMapping = (sheets: readonly Sheet[]): SheetMapping[] => sheets.map(suggestSheet);

function suggestSheet(sheet: Sheet): SheetMapping {
  const candidates = sheet.rows.slice(0, HEADING_SEARCH_ROWS).flatMap((row) => SHEET_KINDS.map((kind) => candidate(sheet, row, kind)));
  const best = candidates.sort((a, b) => b.score - a.score)[0];
  if (!best || best.score <= 0) return { sheet: sheet.name, kind: null, headingRow: 1, places: {}, dateOrder: null };
  return { ...mappingFor(sheet, best.kind, best.rowNo), kind: best.kind };
}

function candidate(sheet: Sheet, row: SheetRow, kind: SheetKind) {
  const places = placesIn(row, kind);
  const found = COLUMNS[kind].filter(({ field }) => places[field] !== null);
  const isWhole = COLUMNS[kind].every(({ field, isNeeded }) => !isNeeded || places[field] !== null);
  const isNamedSo = sheet.name.toLowerCase().startsWith(kind.slice(0, 5));
  return { kind, rowNo: row.rowNo, score: (isWhole ? found.length : 0) + (isNamedSo && found.length > 0 ? 100 : 0) };
}

/** The columns of this kind by the headings of one row. */
export function mappingFor(sheet: Sheet, kind: SheetKind, headingRow: number): SheetMapping {
  const row = sheet.rows.find(({ rowNo }) => rowNo === headingRow);
  const mapping: SheetMapping = { sheet: sheet.name, kind, headingRow, places: row ? placesIn(row, kind) : {}, dateOrder: null };
  const dates = dateColumn(sheet, mapping);
  return { ...mapping, dateOrder: dateOrderOf(dates) };
}

function placesIn({ cells }: SheetRow, kind: SheetKind): Record<string, number | null> {
  const keys = cells.map(headingKey);
  const taken = new Set<number>();
  return Object.fromEntries(COLUMNS[kind].map(({ field, headings }) => {
    const place = headings.map((heading) => keys.findIndex((key, at) => key === heading && !taken.has(at))).find((at) => at >= 0);
    if (place !== undefined) taken.add(place);
    return [field, place ?? null];
  }));
}

const dateColumn = (sheet: Sheet, mapping: SheetMapping): Cell[] => {
  const field = mapping.kind ? COLUMNS[mapping.kind].find(({ isDate }) => isDate)?.field : undefined;
  const place = field === undefined ? null : (mapping.places[field] ?? null);
  return place === null ? [] : bodyRows(sheet, mapping).map(({ cells }) => cells[place] ?? BLANK);
};

/** True when somebody must say whether the day or the month comes first. */
export const asksDateOrder = (sheet: Sheet, mapping: SheetMapping): boolean =>
  dateOrderOf(dateColumn(sheet, mapping)) === null && needsDateOrder(dateColumn(sheet, mapping));

export const bodyRows = (sheet: Sheet, { headingRow }: SheetMapping): SheetRow[] => sheet.rows.filter(({ rowNo }) => rowNo > headingRow);

export const isBlankRow = ({ cells }: SheetRow): boolean => cells.every(isBlank);

/** Headings that the sheet needs and does not have, as they are called. */
export const missingColumns = ({ kind, places }: SheetMapping): string[] =>
  kind === null ? [] : COLUMNS[kind].filter(({ field, isNeeded }) => isNeeded && (places[field] ?? null) === null).map(({ label }) => label);

/** The cells of a row by the fact they hold. */
export const fieldsOf = ({ cells }: SheetRow, { places }: SheetMapping) => (field: string): Cell => {
  const place = places[field] ?? null;
  return place === null ? BLANK : (cells[place] ?? BLANK);
};
