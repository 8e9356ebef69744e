import 'server-only';
import { createHash } from 'node:crypto';
import { recordAudit } from '@/db/audit';
import { insertImportBatch, keepUpload } from '@/db/imports';
import { enqueueJob } from '@/db/jobs';
import { transaction } from '@/db/transaction';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { assertCan } from '@/policies/ability';
import { assertSafeWorkbook } from './zip-directory';

export type Upload = { bytes: Buffer; fileName: string };

/** Takes a workbook in and has it read in the background. Only its table of contents is looked at here. */
export async function uploadWorkbook({ bytes, fileName }: Upload, context: Context): Promise<{ batchId: string; jobId: string }> {
  const { db, ability, actor, now } = context;
  assertCan(ability, 'create', 'Import', {});
  assertSafeWorkbook(bytes, fileName);
  const batchId = newId();
  const name = fileName.replace(/[\p{Cc}/\\]/gu, ' ').trim().slice(0, 120);
  return transaction(db, async (trx) => {
    await insertImportBatch(trx, { id: batchId, fileName: name, fileSha256: createHash('sha256').update(bytes).digest('hex'), createdBy: actor.personId, createdAt: now });
    await keepUpload(trx, batchId, bytes);
    const jobId = await enqueueJob(trx, { id: newId(), kind: 'read_import', key: `read_import:${batchId}`, label: `Reading ${name}`, askedByUserId: actor.userId, input: { batchId } });
    await recordAudit(trx, context, { action: 'upload', tableName: 'import_batch', rowId: batchId, sentence: `Chose the workbook ${name} for an import.` });
    return { batchId, jobId };
  });
}
