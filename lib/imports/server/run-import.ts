import 'server-only';
import { recordAudit } from '@/db/audit';
import type { Trx } from '@/db/connection';
import { changeImportBatch, dropUpload, findImportBatch, setImportTargets, type ImportTarget } from '@/db/imports';
import { sealMade, type Made } from '@/db/imports-made';
import { insertTerm } from '@/db/terms';
import { transaction } from '@/db/transaction';
import { yearLabelOf } from '@/lib/calendar/term';
import { AppError, notFound } from '@/lib/errors';
import { listOf, plural } from '@/lib/format';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { assertCan } from '@/policies/ability';
import { KIND_WORDS, SHEET_KINDS, type SheetKind } from '../columns';
import type { CheckedRow, RowFacts } from '../rows';
import type { ImportChoices } from '../schema';
import { TARGET_TABLES, writeVerdicts } from './check-import';
import { settingsOf, sheetsOf, type SiteOptions } from './import-plan';
import { startRun, type ImportRun } from './import-run';
import { writeEnrolment } from './write-enrolment';
import { writeFamily } from './write-family';
import { writeRoom } from './write-room';
import { writeStudent } from './write-student';
import { writeTeacher } from './write-teacher';

export type Imported = Record<SheetKind, number>;

/**
 * Brings in every new row of a checked workbook, all in one transaction: the verdicts are given once more against the
 * school as it is now, then people, rooms, families, students and their weekly lessons are written. Rows that the
 * school has already are left alone, so a second run changes nothing.
 */
export async function runImport({ batchId }: { batchId: string }, context: Context): Promise<Imported> {
  const { db, ability } = context;
  const batch = await findImportBatch(db, batchId);
  if (!batch) throw notFound('import');
  assertCan(ability, 'approve', 'Import', batch);
  if (batch.state !== 'checked') throw new AppError('conflict', batch.state === 'uploaded' ? 'This workbook is still being read.' : 'This workbook has been brought in already.');
  const [settings, sheets] = [settingsOf(batch), await sheetsOf(db, batchId)];
  return transaction(db, async (trx) => {
    const { rows, options } = await writeVerdicts(trx, context, { batchId, sheets, settings });
    const fresh = rows.filter((row): row is Fresh => row.verdict === 'new' && row.facts !== null);
    const { made, targets, imported } = await writeRows(trx, context, { choices: settings.choices, options, rows: fresh });
    await setImportTargets(trx, batchId, targets);
    await sealMade(trx, batchId, made);
    await dropUpload(trx, batchId);
    if (!(await changeImportBatch(trx, batchId, ['checked'], { state: 'imported', importedAt: context.now }))) throw new AppError('conflict', 'This workbook has been brought in already.');
    await recordAudit(trx, context, { action: 'import', tableName: 'import_batch', rowId: batchId, after: imported, sentence: `Brought in ${batch.fileName}: ${inWords(imported, context)}.` });
    return imported;
  });
}

const inWords = (imported: Imported, { school }: Pick<Context, 'school'>): string =>
  listOf(SHEET_KINDS.map((kind) => plural(imported[kind], KIND_WORDS[kind].one, KIND_WORDS[kind].many.toLowerCase())), school.locale);

type Written = { made: Made[]; targets: ImportTarget[]; imported: Imported };

type Fresh = CheckedRow & { facts: RowFacts };
type ToWrite = { choices: ImportChoices; options: SiteOptions; rows: readonly Fresh[] };

async function writeRows(trx: Trx, context: Context, { choices, options, rows }: ToWrite): Promise<Written> {
  const imported: Imported = { teachers: 0, rooms: 0, families: 0, students: 0, enrolments: 0 };
  const { site, plan, known } = options;
  if (!plan) throw new AppError('invalid', 'Say which term the lessons belong to.', { newTerm: ['Enter the first and the last day of the term.'] });
  const made: Made[] = [];
  const run = await startRun({ trx, context, site, known, choices, plan, termId: await termFor(trx, choices, context, made), placesStudents: rows.some(({ facts }) => facts.kind === 'students' && facts.level !== null) });
  run.made.push(...made);
  const targets: ImportTarget[] = [];
  for (const row of rows) {
    const id = await writeRow(run, row);
    run.ids.set(row.key, id);
    targets.push({ sheet: row.sheet, rowNo: row.rowNo, targetTable: TARGET_TABLES[row.kind], targetId: id });
    imported[row.kind] += 1;
  }
  return { made: run.made, targets, imported };
}

function writeRow(run: ImportRun, { facts, sheet, rowNo, key }: Fresh): Promise<string> {
  const place = { sheet, rowNo, key };
  switch (facts.kind) {
    case 'teachers': return writeTeacher(run, facts, place);
    case 'rooms': return writeRoom(run, facts, place);
    case 'families': return writeFamily(run, facts, place);
    case 'students': return writeStudent(run, facts, place);
    case 'enrolments': return writeEnrolment(run, facts, place);
  }
}

/** The chosen term, or the one that the form asked for because the school had none. */
async function termFor(trx: Trx, { termId, newTerm }: ImportChoices, { today }: Context, made: Made[]): Promise<string> {
  if (!newTerm) return termId ?? '';
  const id = newId();
  made.push({ table: 'term', id, sheet: '', rowNo: 0 });
  const yearLabel = yearLabelOf(newTerm.startsOn);
  await insertTerm(trx, { id, ...newTerm, yearLabel, state: newTerm.startsOn <= today ? 'published' : 'planned' });
  return id;
}
