import { createHash } from 'node:crypto';
import type { EpochSeconds } from '@/lib/time';
import type { Db, Trx } from './connection';

export type AttemptState = 'started' | 'waiting' | 'failed' | 'expired' | 'paid';
export type PaymentAttempt = {
  id: string; invoiceId: string; shareId: string; payerId: string; tryNo: number; amountMinor: number; idempotencyKey: string; sessionId: string | null; intentId: string | null;
  hostedUrl: string | null; expiresAt: EpochSeconds | null; state: AttemptState; reason: string; paymentId: string | null; startedBy: string | null; startedAt: EpochSeconds;
};

/** The next try at an invoice. The key is on disk before the processor hears of it. */
export async function insertAttempt(trx: Trx, attempt: Omit<PaymentAttempt, 'tryNo' | 'idempotencyKey' | 'sessionId' | 'intentId' | 'hostedUrl' | 'expiresAt' | 'state' | 'reason' | 'paymentId'>): Promise<PaymentAttempt> {
  const [last]: { tryNo: number | null }[] = await trx('payment_attempt').where({ invoiceId: attempt.invoiceId }).max('tryNo as tryNo');
  const tryNo = (last?.tryNo ?? 0) + 1;
  await trx('payment_attempt').insert({ ...attempt, tryNo, idempotencyKey: `invoice:${attempt.invoiceId}:attempt:${tryNo}` });
  return (await findAttempt(trx, attempt.id))!;
}

export const findAttempt = (db: Db, id: string): Promise<PaymentAttempt | undefined> => db<PaymentAttempt>('payment_attempt').where({ id }).first();
export const attemptBySession = (db: Db, sessionId: string): Promise<PaymentAttempt | undefined> => db<PaymentAttempt>('payment_attempt').where({ sessionId }).first();
/** A try that may still be paid. */
export const liveAttempt = (db: Db, shareId: string): Promise<PaymentAttempt | undefined> =>
  db<PaymentAttempt>('payment_attempt').where({ shareId }).whereIn('state', ['started', 'waiting']).orderBy('tryNo', 'desc').first();

export async function changeAttempt(trx: Trx, id: string, change: Partial<PaymentAttempt> & { settledAt?: EpochSeconds }): Promise<void> {
  await trx('payment_attempt').where({ id }).update(change);
}

/** Notes an event from outside once; answers whether it is the first time. In the transaction of its effect. */
export async function claimEvent(trx: Trx, event: { source: string; eventId: string; type: string; body: string; effect: string; processedAt: EpochSeconds }): Promise<boolean> {
  const { body, ...row } = event;
  const bodySha256 = createHash('sha256').update(body).digest('hex');
  const rows: unknown[] = await trx('external_event').insert({ ...row, bodySha256 }).onConflict(['source', 'event_id']).ignore().returning('event_id');
  return rows.length > 0;
}
export async function isEventKnown(db: Db, source: string, eventId: string): Promise<boolean> {
  return (await db('external_event').where({ source, eventId }).first('eventId')) !== undefined;
}
