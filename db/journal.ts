import type { JournalLine } from '@/lib/tuition/journal';
import type { LocalDate } from '@/lib/time';
import type { Db, Trx } from './connection';

export type NewEntry = { id: string; legalEntityId: string; postedOn: LocalDate; documentKind: 'invoice' | 'credit_note' | 'payment' | 'refund' | 'earning' | 'pay_run'; documentId: string; memo: string; currency: string };

/** Posts one entry; the database refuses one that does not balance, and any change afterwards. */
export async function postJournal(trx: Trx, entry: NewEntry, lines: readonly JournalLine[], familyId: string | null): Promise<void> {
  if (lines.length === 0) return;
  await trx('journal_entry').insert(entry);
  await trx('journal_line').insert(lines.map((line, index) => ({ entryId: entry.id, lineNo: index + 1, ...line, familyId })));
  await trx('journal_entry').where({ id: entry.id }).update({ state: 'posted' });
}

export const accountBalances = (db: Db): Promise<{ accountCode: string; balanceMinor: number }[]> =>
  db('journal_line as l').join('journal_entry as e', 'e.id', 'l.entryId').where('e.state', 'posted').groupBy('l.accountCode').orderBy('l.accountCode')
    .select('l.accountCode', db.raw('sum(l.debit_minor - l.credit_minor) AS balance_minor'));
