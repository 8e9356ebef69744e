import type { AppAbility } from '@/policies/ability';
import { allowedRows } from '@/policies/where';
import type { EpochSeconds, LocalDate } from '@/lib/time';
import type { Db, Trx } from './connection';

export type PaymentMethod = 'card' | 'cash' | 'transfer' | 'cheque' | 'opening';
export type Payment = {
  id: string; legalEntityId: string; payerId: string; amountMinor: number; currency: string; method: PaymentMethod; receivedOn: LocalDate; receivedAt: EpochSeconds;
  externalKey: string | null; receiptNo: number | null; receiptDocumentNo: string | null; cardBrand: string | null; cardLast4: string | null; siteId: string | null; note: string; takenBy: string | null;
};

export async function insertPayment(trx: Trx, payment: Payment): Promise<void> {
  await trx('payment').insert(payment);
}
export const paymentByKey = (db: Db, externalKey: string): Promise<Payment | undefined> => db<Payment>('payment').where({ externalKey }).first();

export type NewAllocation = { id: string; payerId: string; paymentId: string; instalmentId: string | null; lateFeeId: string | null; amountMinor: number; madeOn: LocalDate; sentence: string };
export async function insertAllocations(trx: Trx, allocations: NewAllocation[]): Promise<void> {
  if (allocations.length > 0) await trx('allocation').insert(allocations);
}

export type PaymentRow = Payment & { state: 'received' | 'disputed' | 'returned'; payerName: string; familyName: string; familyId: string; allocatedMinor: number };
const listed = (db: Db, ability: AppAbility) => db('payment as m').join('payer as y', 'y.id', 'm.payerId').join('family as f', 'f.id', 'y.familyId').leftJoin('person as p', 'p.id', 'y.personId')
  .where(allowedRows(ability, 'read', 'Payment', 'm'))
  .select<PaymentRow[]>('m.*', 'f.name as familyName', 'f.id as familyId', db.raw("coalesce(y.organisation_name, trim(coalesce(p.called_name, p.given_name) || ' ' || p.family_name)) AS payer_name"),
    db.raw('coalesce((SELECT sum(a.amount_minor) FROM allocation a WHERE a.payment_id = m.id AND a.reversed_on IS NULL), 0) AS allocated_minor'))
  .orderBy('m.receivedAt', 'desc').orderBy('m.receiptNo', 'desc');

export const recentPayments = (db: Db, ability: AppAbility, limit: number | null): Promise<PaymentRow[]> => (limit === null ? listed(db, ability) : listed(db, ability).limit(limit));
export async function countPayments(db: Db, ability: AppAbility): Promise<number> {
  const [row]: { count: number }[] = await db('payment as m').where(allowedRows(ability, 'read', 'Payment', 'm')).count('m.id as count');
  return row?.count ?? 0;
}
export const paymentsOfPayers = (db: Db, ability: AppAbility, payerIds: readonly string[]): Promise<PaymentRow[]> => listed(db, ability).whereIn('m.payerId', [...payerIds]);

export type AllocationRow = { paymentId: string; amountMinor: number; sentence: string };
export const allocationsOf = (db: Db, paymentIds: readonly string[]): Promise<AllocationRow[]> =>
  db<AllocationRow & { reversedOn: string | null; createdAt: number }>('allocation').whereIn('paymentId', [...paymentIds]).whereNull('reversedOn').orderBy('createdAt').select('paymentId', 'amountMinor', 'sentence');
