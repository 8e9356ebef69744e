import type { PayRunState } from '@/lib/payroll/pay-run-state';
import type { EpochSeconds, LocalDate } from '@/lib/time';
import type { Db, Trx } from './connection';

export type PayPeriod = { id: string; legalEntityId: string; engagementKind: 'employee' | 'contractor'; label: string; startsOn: LocalDate; endsOn: LocalDate; payOn: LocalDate | null };
export type PayRun = {
  id: string; payPeriodId: string; state: PayRunState; answerByOn: LocalDate | null; gatheredAt: EpochSeconds | null; closedAt: EpochSeconds | null; totalsJson: string; snapshotHash: string | null; rowVersion: number;
};
export type PayRunWithPeriod = PayRun & Omit<PayPeriod, 'id'> & { currency: string };

export async function ensurePayPeriod(trx: Trx, period: PayPeriod): Promise<PayPeriod> {
  const { legalEntityId, engagementKind, startsOn, endsOn } = period;
  const known = await trx<PayPeriod>('pay_period').where({ legalEntityId, engagementKind, startsOn, endsOn }).first();
  if (known) return known;
  await trx('pay_period').insert(period);
  return period;
}

export async function insertPayRun(trx: Trx, run: { id: string; payPeriodId: string; createdBy: string | null }): Promise<void> {
  await trx('pay_run').insert(run);
}
export const runOfPeriod = (db: Db, payPeriodId: string): Promise<PayRun | undefined> => db<PayRun>('pay_run').where({ payPeriodId, isExtra: 0 } as Partial<PayRun>).first();

const joined = (db: Db) => db('pay_run as r').join('pay_period as p', 'p.id', 'r.payPeriodId').join('legal_entity as n', 'n.id', 'p.legalEntityId')
  .select<PayRunWithPeriod[]>('r.id', 'r.payPeriodId', 'r.state', 'r.answerByOn', 'r.gatheredAt', 'r.closedAt', 'r.totalsJson', 'r.snapshotHash', 'r.rowVersion',
    'p.legalEntityId', 'p.engagementKind', 'p.label', 'p.startsOn', 'p.endsOn', 'p.payOn', 'n.currency');
export const findPayRun = (db: Db, id: string): Promise<PayRunWithPeriod | undefined> => joined(db).where('r.id', id).first();
export const allPayRuns = (db: Db): Promise<PayRunWithPeriod[]> => joined(db).orderBy('p.startsOn', 'desc').orderBy('p.engagementKind', 'desc');

export async function changePayRun(trx: Trx, id: string, change: Partial<PayRun> & { approvedBy?: string; approvedAt?: EpochSeconds; closedBy?: string }): Promise<void> {
  await trx('pay_run').where({ id }).update({ ...change, rowVersion: trx.raw('row_version + 1') });
}

export type PayCheck = { payRunId: string; engagementId: string; state: 'waiting' | 'agreed' | 'queried' | 'passed_over'; totalMinor: number; reason: string; at: EpochSeconds | null };
export const checksOf = (db: Db, payRunId: string): Promise<PayCheck[]> => db<PayCheck>('pay_check').where({ payRunId }).select();
export async function setCheck(trx: Trx, check: PayCheck): Promise<void> {
  await trx('pay_check').insert(check).onConflict(['pay_run_id', 'engagement_id']).merge();
}

export type PayQuery = {
  id: string; payRunId: string; engagementId: string; payLineId: string | null; aboutOn: LocalDate; aboutText: string; text: string; state: 'open' | 'accepted' | 'declined';
  answer: string; amountChangeMinor: number; askedBy: string; askedAt: EpochSeconds; answeredBy: string | null; answeredAt: EpochSeconds | null;
};
export const queriesOf = (db: Db, payRunId: string): Promise<PayQuery[]> => db<PayQuery>('pay_query').where({ payRunId }).orderBy('askedAt').select();
export const findQuery = (db: Db, id: string): Promise<PayQuery | undefined> => db<PayQuery>('pay_query').where({ id }).first();
export async function insertQuery(trx: Trx, query: Omit<PayQuery, 'state' | 'answer' | 'amountChangeMinor' | 'answeredBy' | 'answeredAt'>): Promise<void> {
  await trx('pay_query').insert(query);
}
export async function answerQuery(trx: Trx, id: string, answer: Pick<PayQuery, 'state' | 'answer' | 'amountChangeMinor' | 'answeredBy' | 'answeredAt'>): Promise<void> {
  await trx('pay_query').where({ id }).update(answer);
}

export type PayStatement = { id: string; payRunId: string; engagementId: string; legalEntityId: string; sequenceNo: number; documentNo: string; grossMinor: number; reimbursementMinor: number; currency: string; totalsJson: string };
export async function insertStatement(trx: Trx, statement: PayStatement): Promise<void> {
  await trx('pay_statement').insert(statement);
}
export const statementOf = (db: Db, payRunId: string, engagementId: string): Promise<PayStatement | undefined> => db<PayStatement>('pay_statement').where({ payRunId, engagementId }).first();

/** Lessons that a closed run has paid: their marks are settled. */
export async function lockOccurrences(trx: Trx, payRunId: string): Promise<void> {
  await trx('occurrence').whereIn('id', trx('pay_line').where({ payRunId }).whereNotNull('occurrenceId').select('occurrenceId')).whereNull('lockedByPayRunId').update({ lockedByPayRunId: payRunId });
}
