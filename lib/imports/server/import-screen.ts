import 'server-only';
import type { Db } from '@/db/connection';
import { findImportBatch, importBatches, importRowsOf, type ImportBatch, type ImportRow, type ImportState } from '@/db/imports';
import { findJobByKey } from '@/db/jobs';
import { allSites } from '@/db/rooms';
import { allTerms } from '@/db/terms';
import { notFound } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import type { LocalDate } from '@/lib/time';
import { assertCan } from '@/policies/ability';
import { typedText } from '../cell';
import { COLUMNS, KIND_WORDS, type SheetKind } from '../columns';
import { asksDateOrder, type SheetMapping } from '../mapping';
import type { RowFacts, Verdict } from '../rows';
import type { ImportChoices } from '../schema';
import { datesOf } from '../weekly-slots';
import type { Control } from './check-import';
import { checkOptionsFor, settingsOf, sheetsOf } from './import-plan';
import { undoObstacles, type Obstacle } from './undo-import';

export type ImportListRow = { batchId: string; fileName: string; state: ImportState | 'unreadable'; createdAt: number; byName: string; newRows: number; problems: number };

export async function importList({ db, ability }: Context): Promise<ImportListRow[]> {
  assertCan(ability, 'read', 'Import', {});
  return (await importBatches(db)).map(({ id, fileName, state, createdAt, byName, controlJson, readState }) => {
    const { sheets = [] } = JSON.parse(controlJson) as Partial<Control>;
    return { batchId: id, fileName, state: state === 'uploaded' && readState === 'failed' ? 'unreadable' : state, createdAt, byName: byName ?? '', newRows: sheets.reduce((sum, { byVerdict }) => sum + byVerdict.new, 0), problems: sheets.reduce((sum, { problems }) => sum + problems, 0) };
  });
}

export type PreviewRow = { rowNo: number; title: string; verdict: Verdict; reason: string; cells: string[] };
export type PreviewSheet = { sheet: string; kind: SheetKind; kindWord: string; rows: PreviewRow[] };
export type SheetReading = { mapping: SheetMapping; headings: string[]; asksDateOrder: boolean; rowCount: number };
export type ImportDetail = {
  batchId: string; fileName: string; state: ImportState; jobId: string | null; control: Control | null; choices: ImportChoices | null;
  sheets: PreviewSheet[]; readings: SheetReading[]; newCounts: { word: string; count: number }[]; newTeachers: number; lessonCount: number; obstacles: Obstacle[];
  sites: { id: string; name: string }[]; terms: { id: string; name: string; startsOn: LocalDate; endsOn: LocalDate }[]; currency: string; locale: string; importedAt: number | null;
};

/** One import for looking at: verdicts row by row, control totals, and what is still to be said before it can run. */
export async function importDetail({ batchId }: { batchId: string }, context: Context): Promise<ImportDetail> {
  const { db, ability, school } = context;
  const batch = await findImportBatch(db, batchId);
  if (!batch) throw notFound('import');
  assertCan(ability, 'read', 'Import', batch);
  const rows = await importRowsOf(db, batchId);
  return {
    batchId, fileName: batch.fileName, state: batch.state, importedAt: batch.importedAt, currency: school.currency, locale: school.locale, jobId: await jobOf(db, batch),
    ...(batch.state === 'uploaded' ? UNREAD : readPart(batch, rows)), ...(batch.state === 'checked' ? await openPart(context, batch, rows) : { readings: [], lessonCount: 0 }), ...newRowsIn(rows),
    obstacles: batch.state === 'imported' ? await undoObstacles(db, batchId) : [], sites: (await allSites(db)).map(({ id, name }) => ({ id, name })),
    terms: (await allTerms(db)).filter(({ state }) => state !== 'closed').map(({ id, name, yearLabel, startsOn, endsOn }) => ({ id, name: `${name} ${yearLabel}`, startsOn, endsOn })),
  };
}

const UNREAD = { control: null, choices: null, sheets: [] };

function readPart(batch: ImportBatch, rows: readonly ImportRow[]): Pick<ImportDetail, 'control' | 'choices' | 'sheets'> {
  const { choices, mapping } = settingsOf(batch);
  return { control: JSON.parse(batch.controlJson) as Control, choices, sheets: previewSheets(rows, mapping) };
}

/** What only matters while the rows can still be read in another way. */
async function openPart(context: Context, batch: ImportBatch, rows: readonly ImportRow[]): Promise<Pick<ImportDetail, 'readings' | 'lessonCount'>> {
  const { mapping, choices } = settingsOf(batch);
  return { readings: await readingsOf(context.db, batch.id, mapping), lessonCount: await lessonsIn(rows, choices, context) };
}

/** The work that is under way for it, or that failed and says why. */
async function jobOf(db: Db, { id, state }: ImportBatch): Promise<string | null> {
  const job = await findJobByKey(db, `${state === 'uploaded' ? 'read' : 'run'}_import:${id}`);
  return job && job.state !== 'done' ? job.id : null;
}

type Raw = { kind: SheetKind; title: string; facts: RowFacts | null; cells: string[] };
const rawOf = ({ rawJson }: ImportRow): Raw => JSON.parse(rawJson) as Raw;

function previewSheets(rows: readonly ImportRow[], mapping: readonly SheetMapping[]): PreviewSheet[] {
  return mapping.flatMap(({ sheet, kind }) => (kind === null ? [] : [{
    sheet, kind, kindWord: KIND_WORDS[kind].many,
    rows: rows.filter((row) => row.sheet === sheet && row.verdict !== 'blank').map((row) => {
      const { title, cells } = rawOf(row);
      return { rowNo: row.rowNo, title, verdict: row.verdict, reason: row.reason, cells };
    }),
  }]));
}

function newRowsIn(rows: readonly ImportRow[]): Pick<ImportDetail, 'newCounts' | 'newTeachers'> {
  const kinds = rows.filter(({ verdict }) => verdict === 'new').map((row) => rawOf(row).kind);
  const count = (kind: SheetKind) => kinds.filter((one) => one === kind).length;
  return { newTeachers: count('teachers'), newCounts: (Object.keys(COLUMNS) as SheetKind[]).map((kind) => ({ word: count(kind) === 1 ? KIND_WORDS[kind].one : KIND_WORDS[kind].many.toLowerCase(), count: count(kind) })).filter(({ count: n }) => n > 0) };
}

async function readingsOf(db: Db, batchId: string, mapping: readonly SheetMapping[]): Promise<SheetReading[]> {
  const sheets = await sheetsOf(db, batchId);
  return mapping.flatMap((one) => {
    const sheet = sheets.find(({ name }) => name === one.sheet);
    const headings = sheet?.rows.find(({ rowNo }) => rowNo === one.headingRow)?.cells.map(typedText) ?? [];
    return sheet ? [{ mapping: one, headings, asksDateOrder: asksDateOrder(sheet, one), rowCount: sheet.rows.length }] : [];
  });
}

async function lessonsIn(rows: readonly ImportRow[], choices: ImportChoices, context: Context): Promise<number> {
  const { plan } = await checkOptionsFor(context.db, choices, context);
  if (!plan) return 0;
  return rows.filter(({ verdict }) => verdict === 'new').map((row) => rawOf(row).facts).reduce((sum, facts) => sum + (facts?.kind === 'enrolments' ? datesOf(facts, plan).length : 0), 0);
}
