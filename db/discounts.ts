import type { Award, DiscountRule } from '@/lib/tuition/discounts';
import type { LocalDate } from '@/lib/time';
import type { Db, Trx } from './connection';

type Dated = { validFrom: LocalDate; validTo?: LocalDate | null };
export type DiscountRow = DiscountRule & { familyId: string | null };

export async function insertDiscountRule(trx: Trx, rule: DiscountRow & Dated & { code: string; approvedBy?: string | null }): Promise<void> {
  await trx('discount_rule').insert(rule);
}
export const discountRulesOn = (db: Db, date: LocalDate): Promise<DiscountRow[]> =>
  db<DiscountRow & { validFrom: LocalDate; validTo: LocalDate | null }>('discount_rule').where('validFrom', '<=', date)
    .andWhere((query) => query.whereNull('validTo').orWhere('validTo', '>', date)).orderBy(['orderNo', 'id']).select('id', 'label', 'qualifies', 'rateBp', 'orderNo', 'familyId');

export async function insertFund(trx: Trx, fund: { id: string; name: string; budgetMinor: number; startsOn: LocalDate }): Promise<void> {
  await trx('scholarship_fund').insert(fund);
}
export async function insertAward(trx: Trx, award: { id: string; fundId: string; studentId: string; enrolmentId?: string | null; rateBp: number; committedMinor?: number; approvedBy?: string | null } & Dated): Promise<void> {
  await trx('scholarship_award').insert(award);
}
export async function awardsOn(db: Db, date: LocalDate): Promise<Award[]> {
  const rows: { id: string; studentId: string; enrolmentId: string | null; rateBp: number }[] = await db('scholarship_award').where('validFrom', '<=', date)
    .andWhere((query) => query.whereNull('validTo').orWhere('validTo', '>', date)).orderBy('id').select('id', 'studentId', 'enrolmentId', 'rateBp');
  return rows.map(({ enrolmentId, ...row }) => ({ ...row, label: 'Scholarship', lineKey: enrolmentId }));
}
