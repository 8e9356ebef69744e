import 'server-only';
import { createHash } from 'node:crypto';
import type { Trx } from '@/db/connection';
import { changeImportBatch, findImportBatch, findUpload, keepSheets, replaceImportRows, type ImportRow } from '@/db/imports';
import { transaction } from '@/db/transaction';
import { AppError, notFound } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { assertCan } from '@/policies/ability';
import { typedText, type Sheet } from '../cell';
import { checkWorkbook } from '../check-workbook';
import { controlTotals, priceTotals, type PriceTotals, type SheetTotals } from '../control-totals';
import { mappingFor, suggestMapping, type SheetMapping } from '../mapping';
import type { CheckedRow } from '../rows';
import type { ImportChoices, ImportSettings } from '../schema';
import { checkOptionsFor, firstChoices, settingsOf, sheetsOf, type SiteOptions } from './import-plan';
import { parseWorkbook } from './parse-workbook';

export type Control = { sheets: SheetTotals[]; prices: PriceTotals };

/** Reads an uploaded workbook into cells, suggests what its sheets are, and gives every row its first verdict. */
export async function readUpload({ batchId }: { batchId: string }, context: Context): Promise<Control> {
  const { db, ability } = context;
  assertCan(ability, 'create', 'Import', {});
  const [batch, bytes] = [await findImportBatch(db, batchId), await findUpload(db, batchId)];
  if (!batch || !bytes) throw notFound('import');
  const sheets = await parseWorkbook(bytes, batch.fileName);
  const settings = { mapping: suggestMapping(sheets), choices: await firstChoices(context) };
  return transaction(db, async (trx) => {
    await keepSheets(trx, batchId, JSON.stringify(sheets));
    return (await writeVerdicts(trx, context, { batchId, sheets, settings })).control;
  });
}

type Again = { batchId: string; choices: ImportChoices; mapping?: SheetMapping[] };

/** Checks once more with other choices or another reading of the columns. Nothing is brought in yet. */
export async function checkAgain({ batchId, choices, mapping }: Again, context: Context): Promise<Control> {
  const { db, ability } = context;
  const batch = await findImportBatch(db, batchId);
  if (!batch) throw notFound('import');
  assertCan(ability, 'update', 'Import', batch);
  const sheets = await sheetsOf(db, batchId);
  const saved = settingsOf(batch).mapping;
  const settings = { mapping: mapping ? mapping.map((wanted) => reread(wanted, saved, sheets)) : saved, choices };
  return transaction(db, async (trx) => (await writeVerdicts(trx, context, { batchId, sheets, settings })).control);
}

/** A sheet that is to be read as another kind, or from another row of headings, has its columns found afresh. */
function reread(wanted: SheetMapping, saved: readonly SheetMapping[], sheets: readonly Sheet[]): SheetMapping {
  const before = saved.find(({ sheet }) => sheet === wanted.sheet);
  const sheet = sheets.find(({ name }) => name === wanted.sheet);
  const isSame = before?.kind === wanted.kind && before.headingRow === wanted.headingRow;
  if (isSame || !sheet || wanted.kind === null) return wanted;
  return mappingFor(sheet, wanted.kind, wanted.headingRow);
}

type Verdicts = { batchId: string; sheets: Sheet[]; settings: ImportSettings };

/** Gives the verdicts as of now and writes them down; the import itself does the same once more inside its own transaction. */
export async function writeVerdicts(trx: Trx, context: Context, { batchId, sheets, settings }: Verdicts): Promise<{ rows: CheckedRow[]; control: Control; options: SiteOptions }> {
  const options = await checkOptionsFor(trx, settings.choices, context);
  const rows = checkWorkbook({ sheets, mapping: settings.mapping }, options);
  const control = { sheets: controlTotals(rows), prices: priceTotals(rows, sheets, settings.mapping, options.currency) };
  const isOpen = await changeImportBatch(trx, batchId, ['uploaded', 'checked'], { state: 'checked', mappingJson: JSON.stringify(settings), controlJson: JSON.stringify(control) });
  if (!isOpen) throw new AppError('conflict', 'This workbook has been brought in already.');
  await replaceImportRows(trx, batchId, rowsToKeep(batchId, rows, sheets));
  return { rows, control, options };
}

export const TARGET_TABLES = { teachers: 'person', rooms: 'room', families: 'family', students: 'person', enrolments: 'enrolment' } as const;

function rowsToKeep(batchId: string, rows: readonly CheckedRow[], sheets: readonly Sheet[]): ImportRow[] {
  return rows.map(({ sheet, kind, rowNo, title, key, facts, verdict, reason, targetId }) => {
    const cells = sheets.find(({ name }) => name === sheet)?.rows.find((row) => row.rowNo === rowNo)?.cells ?? [];
    return {
      id: newId(), batchId, sheet, rowNo, verdict, reason, targetId, targetTable: targetId === null ? null : TARGET_TABLES[kind],
      rawJson: JSON.stringify({ kind, title, key, facts, cells: cells.map(typedText) }), rowHash: createHash('sha256').update(JSON.stringify(facts)).digest('hex'),
    };
  });
}
