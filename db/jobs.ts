import type { EpochSeconds } from '@/lib/time';
import type { Db } from './connection';

export type JobState = 'queued' | 'running' | 'done' | 'failed';
export type Job = {
  id: string; kind: string; label: string; inputJson: string; askedByUserId: string | null; state: JobState; doneCount: number; totalCount: number | null;
  message: string; resultJson: string | null; tries: number;
};

/** Asks for slow work; the same key asked twice is the same job, and a failed one is queued again. */
export async function enqueueJob(db: Db, job: Pick<Job, 'id' | 'kind' | 'label' | 'askedByUserId'> & { input: unknown; key: string }): Promise<string> {
  const { input, ...row } = job;
  await db('job').insert({ ...row, inputJson: JSON.stringify(input) }).onConflict('key').ignore();
  const [found]: Pick<Job, 'id' | 'state'>[] = await db('job').where({ key: job.key }).select('id', 'state');
  if (!found) throw new Error('the job was not written');
  if (found.state === 'failed') await db('job').where({ id: found.id }).update({ state: 'queued', message: '', tries: 0 });
  return found.id;
}

export const findJobByKey = (db: Db, key: string): Promise<Job | undefined> => db<Job & { key: string }>('job').where({ key }).first();
export const findJob = (db: Db, id: string): Promise<Job | undefined> => db<Job>('job').where({ id }).first();

const LEASE_SECONDS = 60;

/** Takes the next job; one whose worker died is taken over when its lease has run out. */
export async function leaseNextJob(db: Db, owner: string, now: EpochSeconds): Promise<Job | undefined> {
  const rows = await db.raw<Job[]>(
    `UPDATE job SET state = 'running', lease_owner = ?, lease_until = ?, tries = tries + 1, started_at = coalesce(started_at, ?)
     WHERE id = (SELECT id FROM job WHERE state = 'queued' OR (state = 'running' AND lease_until < ?) ORDER BY created_at LIMIT 1) RETURNING *`,
    [owner, now + LEASE_SECONDS, now, now],
  );
  return rows[0];
}

export async function reportProgress(db: Db, id: string, now: EpochSeconds, { done, total, message = '' }: { done: number; total: number; message?: string }): Promise<void> {
  await db('job').where({ id }).update({ doneCount: done, totalCount: total, message, leaseUntil: now + LEASE_SECONDS });
}

export async function finishJob(db: Db, id: string, now: EpochSeconds, end: { state: 'done'; result: unknown } | { state: 'failed'; message: string }): Promise<void> {
  const outcome = end.state === 'done' ? { state: end.state, resultJson: JSON.stringify(end.result ?? null) } : { state: end.state, message: end.message };
  await db('job').where({ id }).update({ ...outcome, endedAt: now, leaseUntil: null, leaseOwner: null });
}
