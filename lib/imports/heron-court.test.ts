import { readFileSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { BLANK, typedText } from './cell';
import { checkWorkbook } from './check-workbook';
import { controlTotals, isProblem, priceTotals } from './control-totals';
import { NOTHING_KNOWN } from './known';
import { suggestMapping } from './mapping';
import { parseWorkbook } from './server/parse-workbook';

const DATA = path.resolve(import.meta.dirname, '../../tests/support/data');
type Expected = { sheets: Record<string, { rows: number; imported: number }>; problems: { sheet: string; row: number; what: string }[] };
const expected = JSON.parse(readFileSync(path.join(DATA, 'heron-court.expected.json'), 'utf8')) as Expected;

const plan = { term: { startsOn: '2026-09-07', endsOn: '2026-12-19' }, from: '2026-09-07', siteId: 'site', zone: 'Europe/Dublin', closures: [] };
const options = { currency: 'EUR', today: '2026-09-01', siteId: 'site', plan, known: NOTHING_KNOWN };

describe('a messy workbook of a whole school', () => {
  const load = async () => {
    const sheets = await parseWorkbook(readFileSync(path.join(DATA, 'heron-court.xlsx')), 'heron-court.xlsx');
    const mapping = suggestMapping(sheets);
    return { sheets, mapping, rows: checkWorkbook({ sheets, mapping }, options) };
  };

  it('names every problem with its sheet, row and sentence, and nothing else', async () => {
    const { rows } = await load();
    expect(rows.filter(isProblem).map(({ sheet, rowNo, reason }) => ({ sheet, row: rowNo, what: reason }))).toEqual(expected.problems);
  });

  it('counts what comes in, sheet by sheet', async () => {
    const { rows } = await load();
    const counted = Object.fromEntries(controlTotals(rows).map(({ sheet, rows: all, good }) => [sheet, { rows: all, imported: good }]));
    expect(counted).toEqual(expected.sheets);
  });

  it('adds up: rows are good or problems, and the prices of both are the whole column', async () => {
    const { rows, sheets, mapping } = await load();
    for (const total of controlTotals(rows)) expect(total.good + total.problems).toBe(total.rows);
    const { allMinor, goodMinor, problemMinor } = priceTotals(rows, sheets, mapping, 'EUR');
    expect(goodMinor + problemMinor).toBe(allMinor);
    // This school charges 0.90 a minute, so the column of minutes says what the column of prices must come to.
    const enrolments = sheets.find(({ name }) => name === 'Enrolments');
    const minutes = (enrolments?.rows.slice(1) ?? []).map(({ cells }) => Number.parseInt(typedText(cells[4] ?? BLANK), 10));
    expect(allMinor).toBe(90 * minutes.reduce((sum, one) => sum + one, 0));
    const goodRows = new Set(rows.filter((row) => row.sheet === 'Enrolments' && !isProblem(row)).map(({ rowNo }) => rowNo));
    expect(goodMinor).toBe(90 * minutes.reduce((sum, one, index) => sum + (goodRows.has(index + 2) ? one : 0), 0));
  });
});
