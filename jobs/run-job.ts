import type { Db } from '@/db/connection';
import { finishJob, leaseNextJob, reportProgress, type Job } from '@/db/jobs';
import { AppError } from '@/lib/errors';
import { log } from '@/lib/server/log';
import type { EpochSeconds } from '@/lib/time';
import { JOB_KINDS } from './kinds';

type Worker = { db: Db; owner: string; clock: () => EpochSeconds };
const MOST_TRIES = 5;

/** Takes one job and carries it to its end; answers whether there was one. */
export async function runNextJob({ db, owner, clock }: Worker): Promise<boolean> {
  const job = await leaseNextJob(db, owner, clock());
  if (!job) return false;
  try {
    if (job.tries > MOST_TRIES) throw new AppError('conflict', 'This was tried several times and stopped each time. Ask for help with it.');
    const result = await work(job, { db, owner, clock });
    await finishJob(db, job.id, clock(), { state: 'done', result });
  } catch (error) {
    const message = error instanceof AppError ? error.message : 'Something went wrong on our side. Nothing was left half done; try again.';
    if (!(error instanceof AppError)) log.error({ job: job.kind, error: error instanceof Error ? error.stack : 'unknown' }, 'a job failed');
    await finishJob(db, job.id, clock(), { state: 'failed', message });
  }
  return true;
}

async function work(job: Job, { db, clock }: Worker): Promise<unknown> {
  const run = JOB_KINDS[job.kind];
  if (!run) throw new AppError('invalid', 'Nobody knows how to do this.');
  return run({ input: JSON.parse(job.inputJson) as unknown, askedByUserId: job.askedByUserId, db, now: clock() },
    (progress) => reportProgress(db, job.id, clock(), progress));
}
