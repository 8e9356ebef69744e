import 'server-only';
import { recordAudit } from '@/db/audit';
import type { Db } from '@/db/connection';
import { changeImportBatch, findImportBatch, importRowsOf } from '@/db/imports';
import { changedSince, madeBy, unmake, usedSince, type Made } from '@/db/imports-made';
import { transaction } from '@/db/transaction';
import { AppError, notFound } from '@/lib/errors';
import { plural } from '@/lib/format';
import type { Context } from '@/lib/server/context';
import { assertCan } from '@/policies/ability';
import { MADE_WORDS, useWord } from '../made-words';

/** A row that others have built on since, with what they did, in words. */
export type Obstacle = { sheet: string; rowNo: number; title: string; what: string };

/** Rows of an import that stand in the way of taking it back. Empty: it can be undone. */
export async function undoObstacles(db: Db, batchId: string): Promise<Obstacle[]> {
  const made = await madeBy(db, batchId);
  const titles = new Map((await importRowsOf(db, batchId)).map(({ sheet, rowNo, rawJson }) => [`${sheet}:${rowNo}`, (JSON.parse(rawJson) as { title: string }).title]));
  const found = [
    ...(await usedSince(db, made)).map((use) => ({ one: use, what: useWord(use.by) })),
    ...(await changedSince(db, made)).map((one) => ({ one, what: `${MADE_WORDS[one.table]} changed since` })),
  ];
  const seen = new Map<string, Obstacle>();
  for (const { one, what } of found) seen.set(`${one.sheet}:${one.rowNo}:${what}`, { ...placeOf(one), title: titles.get(`${one.sheet}:${one.rowNo}`) ?? '', what });
  return [...seen.values()].sort((a, b) => a.sheet.localeCompare(b.sheet) || a.rowNo - b.rowNo);
}

const placeOf = ({ sheet, rowNo }: Made) => ({ sheet, rowNo });

/** Takes an import back, whole, as long as nobody has built on it. */
export async function undoImport({ batchId }: { batchId: string }, context: Context): Promise<{ undone: number }> {
  const { db, ability, now } = context;
  const batch = await findImportBatch(db, batchId);
  if (!batch) throw notFound('import');
  assertCan(ability, 'approve', 'Import', batch);
  if (batch.state !== 'imported') throw new AppError('conflict', batch.state === 'undone' ? 'This import has been undone already.' : 'This workbook has not been brought in.');
  return transaction(db, async (trx) => {
    const obstacles = await undoObstacles(trx, batchId);
    if (obstacles.length > 0) throw new AppError('conflict', `This import cannot be undone: ${plural(obstacles.length, 'row has', 'rows have')} been used since. The list below says which.`);
    const made = await madeBy(trx, batchId);
    await unmake(trx, batchId, made);
    await changeImportBatch(trx, batchId, ['imported'], { state: 'undone', undoneAt: now });
    await recordAudit(trx, context, { action: 'undo', tableName: 'import_batch', rowId: batchId, sentence: `Undid the import of ${batch.fileName}.` });
    return { undone: made.length };
  });
}
