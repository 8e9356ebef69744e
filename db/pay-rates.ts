import type { PayRate } from '@/lib/payroll/rates';
import type { PayRule } from '@/lib/payroll/pay-rules';
import type { LocalDate } from '@/lib/time';
import type { Db, Trx } from './connection';

export async function insertPayRates(trx: Trx, rates: (PayRate & { approvedBy?: string | null })[]): Promise<void> {
  for (let at = 0; at < rates.length; at += 100) await trx('pay_rate').insert(rates.slice(at, at + 100));
}
export const allPayRates = (db: Db): Promise<PayRate[]> =>
  db<PayRate>('pay_rate').select('id', 'engagementId', 'workType', 'lessonTypeId', 'lengthMinutes', 'seatsFrom', 'seatsTo', 'siteId', 'amountMinor', 'per', 'validFrom', 'validTo');

export async function insertPayRule(trx: Trx, { value, ...rule }: PayRule & { id: string; sourceText?: string; approvedBy?: string | null }): Promise<void> {
  await trx('pay_rule').insert({ ...rule, valueJson: JSON.stringify(value) });
}

type RuleRow = { kind: string; engagementKind: PayRule['engagementKind']; valueJson: string; validFrom: LocalDate; validTo: LocalDate | null };
export async function allPayRules(db: Db): Promise<PayRule[]> {
  const rows: RuleRow[] = await db('pay_rule').where({ kind: 'substitute' }).select('kind', 'engagementKind', 'valueJson', 'validFrom', 'validTo');
  return rows.map(({ valueJson, ...rule }) => ({ ...rule, value: JSON.parse(valueJson) as unknown }) as PayRule);
}

export type RateLine = PayRate & { lessonTypeLabel: string | null; siteName: string | null };
/** Every rate of every engagement, the newest first within one kind of work. */
export const rateHistory = (db: Db): Promise<RateLine[]> =>
  db('pay_rate as r').leftJoin('lesson_type as t', 't.id', 'r.lessonTypeId').leftJoin('site as w', 'w.id', 'r.siteId')
    .select<RateLine[]>('r.id', 'r.engagementId', 'r.workType', 'r.lessonTypeId', 'r.lengthMinutes', 'r.seatsFrom', 'r.seatsTo', 'r.siteId', 'r.amountMinor', 'r.per', 'r.validFrom', 'r.validTo',
      't.label as lessonTypeLabel', 'w.name as siteName')
    .orderBy(['r.workType', 't.label', 'r.lengthMinutes', 'r.seatsFrom', 'w.name', { column: 'r.validFrom', order: 'desc' }]);

/** The rate before ends the day the new one begins. One that begins on that day or later stands in the way: the database refuses. */
export async function beginPayRate(trx: Trx, rate: PayRate & { approvedBy: string }): Promise<void> {
  const { engagementId, workType, lessonTypeId, lengthMinutes, seatsFrom, seatsTo, siteId } = rate;
  await trx('pay_rate').where({ engagementId, workType, lessonTypeId, lengthMinutes, seatsFrom, seatsTo, siteId }).whereNull('validTo').where('validFrom', '<', rate.validFrom).update({ validTo: rate.validFrom });
  await insertPayRates(trx, [rate]);
}
export const isRateOverlap = (error: unknown): boolean => error instanceof Error && error.message.includes('pay_rate_overlap');

/** The last day whose pay is closed for an engagement; null when none is. */
export async function payClosedUntil(db: Db, engagementId: string): Promise<LocalDate | null> {
  const [row]: { endsOn: LocalDate | null }[] = await db('pay_run as r').join('pay_period as p', 'p.id', 'r.payPeriodId').join('pay_line as l', 'l.payRunId', 'r.id')
    .where({ 'l.engagementId': engagementId }).whereIn('r.state', ['closed', 'exported']).max('p.endsOn as endsOn');
  return row?.endsOn ?? null;
}

export type PaidEngagement = { engagementId: string; personId: string; name: string; kind: 'employee' | 'contractor'; currency: string; legalEntityName: string };
export const paidEngagements = (db: Db): Promise<PaidEngagement[]> =>
  db('engagement as e').join('person as p', 'p.id', 'e.personId').join('legal_entity as w', 'w.id', 'e.legalEntityId').whereNull('e.endsOn').orderBy(['name', 'e.startsOn'])
    .select<PaidEngagement[]>('e.id as engagementId', 'e.personId', 'e.kind', 'w.currency', 'w.name as legalEntityName', db.raw("trim(coalesce(p.called_name, p.given_name) || ' ' || p.family_name) AS name"));
