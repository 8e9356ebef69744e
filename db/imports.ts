import type { EpochSeconds } from '@/lib/time';
import type { Db, Trx } from './connection';

export type ImportState = 'uploaded' | 'checked' | 'imported' | 'undone';
export type ImportBatch = {
  id: string; fileName: string; fileSha256: string; mappingJson: string; controlJson: string; state: ImportState;
  createdBy: string | null; createdAt: EpochSeconds; importedAt: EpochSeconds | null; undoneAt: EpochSeconds | null;
};
export type ImportRow = {
  id: string; batchId: string; sheet: string; rowNo: number; rawJson: string; verdict: 'new' | 'same' | 'changed' | 'duplicate' | 'faulty' | 'blank';
  reason: string; targetTable: string | null; targetId: string | null; rowHash: string;
};

const batches = (db: Db) => db<ImportBatch>('import_batch');

export async function insertImportBatch(trx: Trx, batch: Pick<ImportBatch, 'id' | 'fileName' | 'fileSha256' | 'createdBy' | 'createdAt'>): Promise<void> {
  await trx('import_batch').insert(batch);
}
export const findImportBatch = (db: Db, id: string): Promise<ImportBatch | undefined> => batches(db).where({ id }).first();
type ListedBatch = ImportBatch & { byName: string | null; /** How the reading of an uploaded workbook stands. */ readState: string | null };
export const importBatches = (db: Db): Promise<ListedBatch[]> =>
  db('import_batch as b').leftJoin('person as p', 'p.id', 'b.createdBy').leftJoin('job as j', 'j.key', db.raw("'read_import:' || b.id")).orderBy('b.createdAt', 'desc').limit(100)
    .select<ListedBatch[]>('b.*', 'j.state as readState', db.raw("trim(p.given_name || ' ' || p.family_name) AS by_name"));

/** Moves a batch on from the state it is expected in; answers whether it was there. */
export async function changeImportBatch(trx: Trx, id: string, from: readonly ImportState[], change: Partial<Omit<ImportBatch, 'id'>>): Promise<boolean> {
  return (await trx('import_batch').where({ id }).whereIn('state', [...from]).update(change)) === 1;
}

export async function keepUpload(trx: Trx, batchId: string, content: Buffer): Promise<void> {
  await trx('import_file').insert({ batchId, content });
}
export async function findUpload(db: Db, batchId: string): Promise<Buffer | null> {
  const row = await db<{ batchId: string; content: Buffer | null }>('import_file').where({ batchId }).first('content');
  return row?.content ?? null;
}
/** The cells take the place of the file they were read from. */
export async function keepSheets(trx: Trx, batchId: string, sheetsJson: string): Promise<void> {
  await trx('import_file').where({ batchId }).update({ sheetsJson, content: null });
}
export async function findSheets(db: Db, batchId: string): Promise<string | null> {
  const row = await db<{ batchId: string; sheetsJson: string | null }>('import_file').where({ batchId }).first('sheetsJson');
  return row?.sheetsJson ?? null;
}
export async function dropUpload(trx: Trx, batchId: string): Promise<void> {
  await trx('import_file').where({ batchId }).delete();
}

export async function replaceImportRows(trx: Trx, batchId: string, rows: readonly ImportRow[]): Promise<void> {
  await trx('import_row').where({ batchId }).delete();
  for (let at = 0; at < rows.length; at += 100) await trx('import_row').insert(rows.slice(at, at + 100));
}

export const importRowsOf = (db: Db, batchId: string): Promise<ImportRow[]> => db<ImportRow>('import_row').where({ batchId }).orderBy(['sheet', 'rowNo']);

export type ImportTarget = { sheet: string; rowNo: number; targetTable: string; targetId: string };
/** Which record each new row became. */
export async function setImportTargets(trx: Trx, batchId: string, targets: readonly ImportTarget[]): Promise<void> {
  for (const { sheet, rowNo, targetTable, targetId } of targets) await trx('import_row').where({ batchId, sheet, rowNo }).update({ targetTable, targetId });
}
