import 'server-only';
import { findJob, type JobState } from '@/db/jobs';
import { notFound } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import { assertCan } from '@/policies/ability';

export type JobView = { state: JobState; label: string; doneCount: number; totalCount: number | null; message: string; result: unknown };

/** How far a piece of slow work has come, for the person who asked for it. */
export async function jobProgress({ id }: { id: string }, { db, ability }: Context): Promise<JobView> {
  const job = await findJob(db, id);
  if (!job) throw notFound('job');
  assertCan(ability, 'read', 'Job', job);
  const { state, label, doneCount, totalCount, message, resultJson } = job;
  return { state, label, doneCount, totalCount, message, result: resultJson === null ? null : (JSON.parse(resultJson) as unknown) };
}
