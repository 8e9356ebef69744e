import type { Db } from '@/db/connection';
import type { EpochSeconds } from '@/lib/time';

/** What slow work is handed: what was asked, by whom, and when it runs. */
export type JobMoment = { input: unknown; askedByUserId: string | null; db: Db; now: EpochSeconds };
export type OnProgress = (progress: { done: number; total: number; message?: string }) => Promise<void>;
export type Work = (moment: JobMoment, onProgress: OnProgress) => Promise<unknown>;
