import type { EpochSeconds } from '@/lib/time';
import type { Db } from './connection';

type Attempt = { key: string; failures: number; windowStartedAt: EpochSeconds; totalFailures: number };

export const WINDOW_SECONDS = 15 * 60;

/** Failures within the current window; survives a restart because it is a row. */
export async function failuresOf(db: Db, key: string, now: EpochSeconds): Promise<{ inWindow: number; total: number }> {
  const row = await db<Attempt>('sign_in_attempt').where({ key }).first();
  if (!row) return { inWindow: 0, total: 0 };
  const inWindow = row.windowStartedAt + WINDOW_SECONDS > now ? row.failures : 0;
  return { inWindow, total: row.totalFailures };
}

export async function noteFailure(db: Db, key: string, now: EpochSeconds): Promise<void> {
  await db.raw(
    `INSERT INTO sign_in_attempt (key, failures, window_started_at, total_failures) VALUES (?, 1, ?, 1)
     ON CONFLICT (key) DO UPDATE SET
       failures = CASE WHEN window_started_at + ${WINDOW_SECONDS} > excluded.window_started_at THEN failures + 1 ELSE 1 END,
       window_started_at = CASE WHEN window_started_at + ${WINDOW_SECONDS} > excluded.window_started_at THEN window_started_at ELSE excluded.window_started_at END,
       total_failures = total_failures + 1`,
    [key, now],
  );
}

export async function clearFailures(db: Db, key: string): Promise<void> {
  await db('sign_in_attempt').where({ key }).delete();
}
