import 'server-only';
import { countInvoices } from '@/db/invoice-reads';
import type { ListColumn, TakenList } from '@/lib/exports/server/list-file';
import type { Context } from '@/lib/server/context';
import { assertCan, may } from '@/policies/ability';
import { SHARE_WORDS } from '../share-state';
import { invoiceList } from './staff-invoice';

const COLUMNS: readonly ListColumn[] = [
  { header: 'Number', width: 16 }, { header: 'Family', width: 28 }, { header: 'For', width: 30 }, { header: 'Issued', width: 12 }, { header: 'Due', width: 12 },
  { header: 'Currency', width: 10 }, { header: 'Total', isSummed: true }, { header: 'Open', isSummed: true }, { header: 'State', width: 14 },
];

/** How many invoices this person could take out, also where the screen shows only the newest; null for who may not. */
export const invoicesToTake = async ({ db, ability }: Context): Promise<number | null> => (may(ability, 'export', 'Invoice') ? countInvoices(db) : null);

/** Every issued invoice with what is open of it. Amounts and names, no lines: those name children and lessons. */
export async function takeInvoiceList(context: Context): Promise<TakenList> {
  assertCan(context.ability, 'export', 'Invoice', {});
  const rows = await invoiceList(context, null);
  return {
    name: 'invoices', tableName: 'invoice', rowId: 'invoices', columns: COLUMNS,
    rows: rows.map(({ documentNo, familyName, label, issuedOn, dueOn, currency, totalMinor, openMinor, state }) =>
      [documentNo, familyName, label, { date: issuedOn }, { date: dueOn }, currency, { amountMinor: totalMinor, currency }, { amountMinor: openMinor, currency }, SHARE_WORDS[state]]),
  };
}
