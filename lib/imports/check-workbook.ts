import { nameKey } from '../people/names';
import type { LocalDate } from '../time';
import { typedText, type Sheet, type SheetRow } from './cell';
import { COLUMNS, KIND_WORDS, SHEET_KINDS, type SheetKind } from './columns';
import { idOf, type Known, type KnownRecord } from './known';
import { bodyRows, fieldsOf, isBlankRow, missingColumns, type SheetMapping } from './mapping';
import { READERS, rowKey, type ReadRow } from './read-rows';
import type { CheckedRow, EnrolmentFacts, RowFacts } from './rows';
import { sheetBook } from './sheet-book';
import { slotFaults, type LessonPlan } from './weekly-slots';

export type Workbook = { sheets: readonly Sheet[]; mapping: readonly SheetMapping[] };
export type CheckOptions = { currency: string; today: LocalDate; siteId: string; plan: LessonPlan | null; known: Known };

/**
 * A verdict for every row of a workbook, before anything is written. Sheets are read in the order in which they build
 * on each other, whatever their order in the file. A row with a fault is left out and named; the rest goes on without it.
 */
export function checkWorkbook({ sheets, mapping }: Workbook, options: CheckOptions): CheckedRow[] {
  const run: Run = { options, book: sheetBook(options.known), slots: [], seen: new Map() };
  return SHEET_KINDS.flatMap((kind) => mapping.filter((one) => one.kind === kind).flatMap((one) => {
    const sheet = sheets.find(({ name }) => name === one.sheet);
    return sheet ? checkSheet(run, sheet, one, kind) : [];
  }));
}

type Run = { options: CheckOptions; book: ReturnType<typeof sheetBook>; slots: EnrolmentFacts[]; /** How often a key was met, and with which facts. */ seen: Map<string, string[]> };
type Place = Pick<CheckedRow, 'sheet' | 'kind' | 'rowNo'>;

function checkSheet(run: Run, sheet: Sheet, mapping: SheetMapping, kind: SheetKind): CheckedRow[] {
  const missing = missingColumns(mapping);
  return bodyRows(sheet, mapping).map((row) => {
    const place = { sheet: sheet.name, kind, rowNo: row.rowNo };
    if (isBlankRow(row)) return { ...place, key: '', title: '', verdict: 'blank', reason: '', facts: null, targetId: null };
    if (missing.length > 0) return leftOut(place, row.cells.map(typedText).find((text) => text !== '') ?? '', `the sheet has no column ${missing.join(', ')}`);
    return checkRow(run, place, row, mapping);
  });
}

const leftOut = (place: Place, title: string, reason: string, verdict: 'faulty' | 'duplicate' = 'faulty'): CheckedRow =>
  ({ ...place, key: '', title, verdict, reason, facts: null, targetId: null });

function checkRow(run: Run, place: Place, row: SheetRow, mapping: SheetMapping): CheckedRow {
  const { book, options } = run;
  const { currency, today, known, siteId } = options;
  const { facts, faults, title } = READERS[place.kind]({ field: fieldsOf(row, mapping), manner: { currency, today, dateOrder: mapping.dateOrder }, find: book.find });
  if (!facts || faults.length > 0) {
    book.leaveOut(place.kind, title);
    return leftOut(place, title, faults.join('; '));
  }
  const key = keyWithin(run, facts, rowKey(facts, siteId));
  if (key === null) return leftOut(place, title, `${KIND_WORDS[place.kind].one} is listed twice`, 'duplicate');
  const record = known.byKey.get(key) ?? recordByName(known, facts);
  if (!record) return newRow(run, { ...place, key }, { facts, title });
  accept(run, facts, title, known.byKey.has(key) ? { key } : { id: record.id });
  const differences = record.facts ? differing(record.facts, facts) : [];
  const reason = differences.length > 0 ? `the school has another ${differences.join(', ')}; it is left as it is` : '';
  return { ...place, key, title, facts, verdict: differences.length > 0 ? 'changed' : 'same', reason, targetId: record.id };
}

function newRow(run: Run, place: Place & { key: string }, { facts, title }: Pick<ReadRow, 'title'> & { facts: RowFacts }): CheckedRow {
  const { plan, known } = run.options;
  const faults = facts.kind === 'enrolments'
    ? slotFaults(facts, run.slots, plan, (holder, reference) => known.taken.get(`${holder}:${idOf(known, reference)}`) ?? [])
    : [];
  if (faults.length > 0) return leftOut(place, title, faults.join('; '));
  accept(run, facts, title, { key: place.key });
  return { ...place, title, facts, verdict: 'new', reason: '', targetId: null };
}

function accept(run: Run, facts: RowFacts, title: string, reference: { key: string } | { id: string }): void {
  if (facts.kind === 'enrolments') run.slots.push(facts);
  else run.book.accept(facts.kind, title, reference);
}

/**
 * The key of a row within its workbook; null when the same was listed above. Two weekly lessons of the same student
 * and teacher on one day are two enrolments when they differ, and then the second carries its number.
 */
function keyWithin(run: Run, facts: RowFacts, key: string): string | null {
  const before = run.seen.get(key) ?? [];
  const text = JSON.stringify(facts);
  if (before.length > 0 && (facts.kind !== 'enrolments' || before.includes(text))) return null;
  run.seen.set(key, [...before, text]);
  return before.length === 0 ? key : `${key}:${before.length + 1}`;
}

/** What the school entered by hand: teachers and rooms by name, families by name and the first payer's e-mail, students by name in their family. */
function recordByName(known: Known, facts: RowFacts): KnownRecord | null {
  if (facts.kind === 'teachers' || facts.kind === 'rooms') {
    const id = known.byName[facts.kind].get(nameKey(facts.name));
    return id ? { id, facts: null } : null;
  }
  const id = facts.kind === 'families' ? known.familyByPayer.get(`${nameKey(facts.name)}|${facts.payers[0]?.email ?? ''}`)
    : facts.kind === 'students' ? known.studentByFamily.get(`${idOf(known, facts.family)}|${nameKey(facts.name)}`) : undefined;
  return id ? { id, facts: null } : null;
}

/** The facts that differ, by the names of their columns. */
function differing(before: RowFacts, after: RowFacts): string[] {
  const [old, now] = [Object.entries(before), new Map(Object.entries(after))];
  const fields = old.filter(([field, value]) => JSON.stringify(value) !== JSON.stringify(now.get(field))).map(([field]) => field);
  return [...new Set(fields.map((field) => FACT_WORDS[field] ?? COLUMNS[after.kind].find((spec) => spec.field === field)?.label.toLowerCase() ?? 'detail'))];
}

const FACT_WORDS: Record<string, string> = {
  rates: 'rate', weekdays: 'list of days', personLimit: 'number of seats', description: 'equipment', features: 'equipment', payers: 'payer',
  startMin: 'start', lengthMinutes: 'length', priceMinor: 'price', startsOn: 'first day', weekday: 'day', levelTo: 'highest level', email: 'e-mail',
};
