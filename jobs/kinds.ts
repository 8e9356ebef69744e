import type { Db } from '@/db/connection';
import type { EpochSeconds } from '@/lib/time';
import { releaseRunJob } from './release-run';

export type JobMoment = { input: unknown; askedByUserId: string | null; db: Db; now: EpochSeconds };
export type OnProgress = (progress: { done: number; total: number; message?: string }) => Promise<void>;
type Work = (moment: JobMoment, onProgress: OnProgress) => Promise<unknown>;

/** Slow work by kind. Each calls the same operation a button would. */
export const JOB_KINDS: Record<string, Work | undefined> = {
  tuition_run: releaseRunJob,
};
