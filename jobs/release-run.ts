import { AppError } from '@/lib/errors';
import { contextOfUser } from '@/lib/server/user-context';
import { releaseRunSchema } from '@/lib/tuition/schema';
import { releaseTuitionRun } from '@/lib/tuition/server/release-tuition-run';
import type { JobMoment, OnProgress } from './moment';

/** The tuition run is released in the name of the person who pressed the button, with what they may do now. */
export async function releaseRunJob({ input, askedByUserId, db, now }: JobMoment, onProgress: OnProgress): Promise<unknown> {
  const context = askedByUserId ? await contextOfUser(db, askedByUserId, now, 'owner') : null;
  if (!context) throw new AppError('forbidden', 'The account that asked for this is no longer live.');
  return releaseTuitionRun(releaseRunSchema.parse(input), context, onProgress);
}
