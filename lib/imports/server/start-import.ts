import 'server-only';
import { findImportBatch, importRowsOf } from '@/db/imports';
import { enqueueJob } from '@/db/jobs';
import { AppError, notFound } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { assertCan } from '@/policies/ability';
import { settingsOf } from './import-plan';

/** Hands a checked workbook to the worker. What the workbook cannot say must have been answered first. */
export async function startImport({ batchId }: { batchId: string }, { db, ability, actor }: Context): Promise<{ jobId: string }> {
  const batch = await findImportBatch(db, batchId);
  if (!batch) throw notFound('import');
  assertCan(ability, 'approve', 'Import', batch);
  if (batch.state !== 'checked') throw new AppError('conflict', 'This workbook has been brought in already, or is still being read.');
  const { choices } = settingsOf(batch);
  const fresh = (await importRowsOf(db, batchId)).filter(({ verdict }) => verdict === 'new').map(({ rawJson }) => (JSON.parse(rawJson) as { kind: string }).kind);
  if (fresh.length === 0) throw new AppError('invalid', 'There is no new row to bring in.');
  if (fresh.includes('teachers') && choices.engagementKind === null) throw new AppError('invalid', 'Say how the teachers of this workbook are engaged, and check again.', { engagementKind: ['Choose employees or contractors.'] });
  if (!choices.newTerm && choices.termId === null) throw new AppError('invalid', 'Say which term the lessons belong to, and check again.', { newTerm: ['Enter the first and the last day of the term.'] });
  const jobId = await enqueueJob(db, { id: newId(), kind: 'run_import', key: `run_import:${batchId}`, label: `Bringing in ${batch.fileName}`, askedByUserId: actor.userId, input: { batchId } });
  return { jobId };
}
