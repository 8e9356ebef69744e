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
