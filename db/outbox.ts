import type { EpochSeconds } from '@/lib/time';
import type { Db } from './connection';

export type MailAttachment = { filename: string; contentType: string; content: string };

export type OutboxRow = {
  id: string; key: string; topic: string; subjectRef: string; recipientId: string | null; toName: string; toAddress: string; language: string;
  subject: string; bodyText: string; bodyHtml: string; attachmentsJson: string;
  state: 'queued' | 'sending' | 'sent' | 'bounced' | 'given_up' | 'withdrawn';
  tries: number; nextTryAt: EpochSeconds; leaseUntil: EpochSeconds | null; leaseOwner: string | null; sentAt: EpochSeconds | null;
  lastError: string | null; createdAt: EpochSeconds;
};

type NewMail = Pick<OutboxRow, 'id' | 'key' | 'topic' | 'subjectRef' | 'recipientId' | 'toName' | 'toAddress' | 'subject' | 'bodyText'> & {
  language?: string; bodyHtml?: string; attachments?: MailAttachment[]; createdAt: EpochSeconds; nextTryAt?: EpochSeconds;
};

/** Adds a mail once: a second one with the same key changes nothing. Answers whether it was new. */
export async function insertMail(db: Db, { attachments = [], ...mail }: NewMail): Promise<boolean> {
  const rows: unknown[] = await db('outbox').insert({ ...mail, attachmentsJson: JSON.stringify(attachments) })
    .onConflict('key').ignore().returning('id');
  return rows.length > 0;
}

/** Takes back what has not gone out yet about one matter; answers how many. A mail on its way is not stopped. */
export const withdrawMails = (db: Db, subjectRef: string): Promise<number> => db('outbox').where({ subjectRef, state: 'queued' }).update({ state: 'withdrawn' });

export const MAX_TRIES = 6;
const LEASE_SECONDS = 120;

/** Takes due mails for one sender; a sender that dies leaves its lease to run out and another takes over. */
export async function leaseDueMails(db: Db, owner: string, now: EpochSeconds, limit: number): Promise<OutboxRow[]> {
  return db.raw<OutboxRow[]>(
    `UPDATE outbox SET state = 'sending', lease_owner = ?, lease_until = ?, tries = tries + 1 WHERE id IN (
       SELECT id FROM outbox WHERE state IN ('queued', 'sending') AND next_try_at <= ? AND (lease_until IS NULL OR lease_until < ?)
       ORDER BY next_try_at, created_at LIMIT ?) RETURNING *`,
    [owner, now + LEASE_SECONDS, now, now, limit],
  );
}

export async function markSent(db: Db, id: string, now: EpochSeconds): Promise<void> {
  await db('outbox').where({ id }).update({ state: 'sent', sentAt: now, leaseUntil: null, leaseOwner: null, lastError: null });
}

/** Waits 1, 4, 16, 64 … minutes between tries, then gives up and shows on the desk's list. */
export async function markFailed(db: Db, mail: Pick<OutboxRow, 'id' | 'tries'>, error: string, now: EpochSeconds): Promise<void> {
  const isLast = mail.tries >= MAX_TRIES;
  await db('outbox').where({ id: mail.id }).update({
    state: isLast ? 'given_up' : 'queued', nextTryAt: now + 60 * 4 ** (mail.tries - 1), leaseUntil: null, leaseOwner: null, lastError: error.slice(0, 300),
  });
}
