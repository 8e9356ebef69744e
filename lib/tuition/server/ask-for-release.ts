import 'server-only';
import type * as z from 'zod';
import { enqueueJob } from '@/db/jobs';
import { findTuitionRun } from '@/db/tuition-runs';
import { AppError, notFound } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { assertCan } from '@/policies/ability';
import type { releaseRunSchema } from '../schema';

/** Asks for the release as slow work that can be left and come back to; asked again it is the same work. */
export async function askForRelease(input: z.output<typeof releaseRunSchema>, context: Context): Promise<{ jobId: string }> {
  assertCan(context.ability, 'approve', 'TuitionRun', {});
  const run = await findTuitionRun(context.db, input.runId);
  if (!run) throw notFound('tuition run');
  if (run.state === 'preview' && run.controlTotalMinor !== input.controlTotalMinor) {
    throw new AppError('conflict', 'The bills have changed since you looked at them. Look again before you release.');
  }
  const jobId = await enqueueJob(context.db, { id: newId(), kind: 'tuition_run', label: `Releasing ${run.label}`, askedByUserId: context.actor.userId, input, key: `tuition_run:${run.id}:${input.controlTotalMinor}` });
  return { jobId };
}
