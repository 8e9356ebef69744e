import { createHash } from 'node:crypto';
import type { EpochSeconds } from '@/lib/time';
import type { Db, Trx } from './connection';

type AuditEntry = {
  at: EpochSeconds;
  actorId: string | null;
  actorRole: string;
  action: string;
  tableName: string;
  rowId: string;
  /** What a person reads: "Pat booked a trial for Wren on Tue 17 Nov, 15:30". */
  sentence: string;
  before?: unknown;
  after?: unknown;
  reason?: string;
};

type AuditRow = {
  seq: number; at: number; actorId: string | null; actorRole: string; action: string; tableName: string; rowId: string;
  sentence: string; beforeJson: string | null; afterJson: string | null; reason: string; prevHash: string; hash: string;
};

/** The part of an operation's context that says who did it and when; a job acts as 'system'. */
export type AuditActor = { actor: { personId: string; role: string } | null; now: EpochSeconds };
export type AuditFact = Omit<AuditEntry, 'at' | 'actorId' | 'actorRole'>;

/** What every operation calls inside its own transaction. */
export const recordAudit = (trx: Trx, { actor, now }: AuditActor, fact: AuditFact): Promise<void> =>
  appendAudit(trx, { ...fact, at: now, actorId: actor?.personId ?? null, actorRole: actor?.role ?? 'system' });

const START = '0'.repeat(64);

/** Appends to the chain: each row carries the hash of the one before it, so a removed or changed row shows. */
async function appendAudit(trx: Trx, entry: AuditEntry): Promise<void> {
  const last = await trx<AuditRow>('audit').orderBy('seq', 'desc').first('seq', 'hash');
  const row = {
    seq: (last?.seq ?? 0) + 1, at: entry.at, actorId: entry.actorId, actorRole: entry.actorRole, action: entry.action,
    tableName: entry.tableName, rowId: entry.rowId, sentence: entry.sentence, beforeJson: jsonOrNull(entry.before),
    afterJson: jsonOrNull(entry.after), reason: entry.reason ?? '', prevHash: last?.hash ?? START,
  };
  await trx('audit').insert({ ...row, hash: hashOf(row) });
}

const jsonOrNull = (value: unknown) => (value === undefined ? null : JSON.stringify(value));

function hashOf(row: Omit<AuditRow, 'hash'>): string {
  const fields = [row.prevHash, row.seq, row.at, row.actorId, row.actorRole, row.action, row.tableName, row.rowId,
    row.sentence, row.beforeJson, row.afterJson, row.reason];
  return createHash('sha256').update(JSON.stringify(fields)).digest('hex');
}

/** Walks the whole chain; answers the first row that does not follow from the one before it, or null. */
export async function firstBrokenAuditRow(db: Db): Promise<number | null> {
  let previous = START;
  let after = 0;
  for (;;) {
    const rows = await db<AuditRow>('audit').where('seq', '>', after).orderBy('seq').limit(500);
    if (rows.length === 0) return null;
    for (const row of rows) {
      if (row.seq !== after + 1 || row.prevHash !== previous || row.hash !== hashOf(row)) return row.seq;
      previous = row.hash;
      after = row.seq;
    }
  }
}
