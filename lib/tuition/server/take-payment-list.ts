import 'server-only';
import { countPayments } from '@/db/payments';
import type { ListColumn, TakenList } from '@/lib/exports/server/list-file';
import type { Context } from '@/lib/server/context';
import { assertCan, may } from '@/policies/ability';
import { METHOD_WORDS } from '../schema';
import { paymentList } from './staff-invoice';

const COLUMNS: readonly ListColumn[] = [
  { header: 'Receipt', width: 16 }, { header: 'Received', width: 12 }, { header: 'Payer', width: 28 }, { header: 'Family', width: 28 }, { header: 'By', width: 16 },
  { header: 'Currency', width: 10 }, { header: 'Kept as credit', isSummed: true }, { header: 'Amount', isSummed: true },
];

/** How many payments this person could take out, also where the screen shows only the newest; null for who may not. */
export const paymentsToTake = async ({ db, ability }: Context): Promise<number | null> => (may(ability, 'export', 'Payment') ? countPayments(db, ability) : null);

/** Money received, newest first. The desk’s notes stay in the house. */
export async function takePaymentList(context: Context): Promise<TakenList> {
  assertCan(context.ability, 'export', 'Payment', {});
  const rows = await paymentList(context, null);
  return {
    name: 'payments', tableName: 'payment', rowId: 'payments', columns: COLUMNS,
    rows: rows.map(({ receiptNo, receivedOn, payerName, familyName, method, currency, creditMinor, amountMinor }) =>
      [receiptNo, { date: receivedOn }, payerName, familyName, METHOD_WORDS[method], currency, { amountMinor: creditMinor, currency }, { amountMinor, currency }]),
  };
}
