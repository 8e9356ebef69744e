import 'server-only';
import type * as z from 'zod';
import { findInvoice, invoicesOfFamily, linesOfInvoice, partsOfShares, recentInvoices, settledOfShares, sharesFor, taxOfInvoice, type InvoiceHead, type TaxRow } from '@/db/invoice-reads';
import { creditOfPayers, instalmentsFor } from '@/db/open-items';
import { payersOfFamilies } from '@/db/payers';
import { paymentsOfPayers, recentPayments, type PaymentMethod } from '@/db/payments';
import { notFound } from '@/lib/errors';
import { sumOf } from '@/lib/money';
import type { Context } from '@/lib/server/context';
import type { LocalDate } from '@/lib/time';
import { assertCan } from '@/policies/ability';
import { ageingOf, type Ageing } from '../ageing';
import type { familySchema, invoiceSchema } from '../schema';
import type { ShareState } from '../share-state';
import { standing, type Seller } from './payer-bills';

export type StaffShare = { payerName: string; amountMinor: number; openMinor: number; nextDueOn: LocalDate | null; state: ShareState; parts: string[] };
export type StaffInvoice = Pick<InvoiceHead, 'documentNo' | 'label' | 'issuedOn' | 'dueOn' | 'currency' | 'netMinor' | 'taxMinor' | 'totalMinor' | 'familyName' | 'familyId'> & {
  seller: Seller; lines: { text: string; amountMinor: number; steps: string[] }[]; tax: TaxRow[]; shares: StaffShare[];
};

/** An invoice as the office sees it: every line with its working, every payer's share. */
export async function staffInvoice({ invoiceId }: z.output<typeof invoiceSchema>, context: Context): Promise<StaffInvoice> {
  const { db } = context;
  assertCan(context.ability, 'read', 'Invoice', { id: invoiceId });
  const invoice = await findInvoice(db, invoiceId);
  if (!invoice) throw notFound('invoice');
  const shares = await sharesFor(db, context.ability, [invoiceId]);
  const [settled, parts, instalments] = [await settledOfShares(db, shares.map(({ id }) => id)), await partsOfShares(db, shares.map(({ id }) => id)), await instalmentsFor(db, shares.map(({ payerId }) => payerId))];
  const { documentNo, label, issuedOn, dueOn, currency, netMinor, taxMinor, totalMinor, familyName, familyId } = invoice;
  return {
    documentNo, label, issuedOn, dueOn, currency, netMinor, taxMinor, totalMinor, familyName, familyId, seller: JSON.parse(invoice.sellerJson) as Seller,
    lines: (await linesOfInvoice(db, invoiceId)).map((line) => ({ text: line.text, amountMinor: line.netMinor, steps: JSON.parse(line.explainJson) as string[] })),
    tax: await taxOfInvoice(db, invoiceId),
    shares: shares.map((share) => ({
      payerName: share.payerName, amountMinor: share.amountMinor, parts: parts.filter(({ shareId }) => shareId === share.id).map(({ sentence }) => sentence.replace('your ', '')),
      ...standing(share, instalments, settled, context.today),
    })),
  };
}

export type InvoiceRow = { invoiceId: string; documentNo: string; familyId: string; familyName: string; label: string; issuedOn: LocalDate; dueOn: LocalDate; totalMinor: number; openMinor: number; state: ShareState; currency: string };
const LIST_LIMIT = 2000;

/** Every issued invoice with what is open of it, the newest ones unless all are wanted; the worst of its parts decides its state. */
export async function invoiceList(context: Context, limit: number | null = LIST_LIMIT): Promise<InvoiceRow[]> {
  assertCan(context.ability, 'read', 'Invoice', {});
  return rowsOf(await recentInvoices(context.db, limit), context);
}

async function rowsOf(invoices: InvoiceHead[], context: Context): Promise<InvoiceRow[]> {
  const openByInvoice = new Map<string, { openMinor: number; nextDueOn: LocalDate | null; settledMinor: number }>();
  for (const { invoiceId, openMinor, settledMinor, dueOn } of await instalmentsFor(context.db, 'all')) {
    const known = openByInvoice.get(invoiceId) ?? { openMinor: 0, nextDueOn: null, settledMinor: 0 };
    openByInvoice.set(invoiceId, { openMinor: known.openMinor + openMinor, settledMinor: known.settledMinor + settledMinor, nextDueOn: known.nextDueOn ?? (openMinor > 0 ? dueOn : null) });
  }
  return invoices.map(({ id, documentNo, familyId, familyName, label, issuedOn, dueOn, totalMinor, currency }) => {
    const { openMinor, nextDueOn } = openByInvoice.get(id) ?? { openMinor: totalMinor, nextDueOn: dueOn };
    const state = stateOfWhole(totalMinor, openMinor, nextDueOn, context.today);
    return { invoiceId: id, documentNo, familyId, familyName, label, issuedOn, dueOn, totalMinor, openMinor, state, currency };
  });
}

function stateOfWhole(totalMinor: number, openMinor: number, nextDueOn: LocalDate | null, today: LocalDate): ShareState {
  if (totalMinor === 0) return 'nothing_to_pay';
  if (openMinor <= 0) return 'paid';
  if (nextDueOn !== null && nextDueOn < today) return 'overdue';
  return openMinor < totalMinor ? 'part_paid' : 'open';
}

export type PaymentListRow = { id: string; receivedOn: LocalDate; receiptNo: string; payerName: string; familyName: string; method: PaymentMethod; amountMinor: number; creditMinor: number; currency: string; note: string };

/** Money received, newest first. */
export async function paymentList(context: Context, limit: number | null = LIST_LIMIT): Promise<PaymentListRow[]> {
  assertCan(context.ability, 'read', 'Payment', {});
  return (await recentPayments(context.db, context.ability, limit)).map(toPaymentRow);
}

const toPaymentRow = (row: Awaited<ReturnType<typeof recentPayments>>[number]): PaymentListRow => ({
  id: row.id, receivedOn: row.receivedOn, receiptNo: row.receiptDocumentNo ?? '', payerName: row.payerName, familyName: row.familyName, method: row.method,
  amountMinor: row.amountMinor, creditMinor: row.amountMinor - row.allocatedMinor, currency: row.currency, note: row.note,
});

export type PayerBalance = { payerId: string; name: string; openMinor: number; creditMinor: number; ageing: Ageing };
export type FamilyBalance = { currency: string; openMinor: number; payers: PayerBalance[]; invoices: InvoiceRow[]; payments: PaymentListRow[] };

/** What a family owes, payer by payer, for the desk on the telephone. */
export async function familyBalance({ familyId }: z.output<typeof familySchema>, context: Context): Promise<FamilyBalance> {
  assertCan(context.ability, 'read', 'Invoice', { familyId });
  const { db, today } = context;
  const payers = await payersOfFamilies(db, [familyId]);
  const ids = payers.map(({ id }) => id);
  const [instalments, credits] = [(await instalmentsFor(db, ids)).filter(({ openMinor }) => openMinor > 0), await creditOfPayers(db, ids)];
  const balances = payers.map(({ id, name }): PayerBalance => {
    const open = instalments.filter(({ payerId }) => payerId === id);
    const creditMinor = credits.get(id) ?? 0;
    return { payerId: id, name, openMinor: sumOf(open.map(({ openMinor }) => openMinor)), creditMinor, ageing: ageingOf(open, creditMinor, today).value };
  });
  return {
    currency: payers[0]?.currency ?? context.school.currency, payers: balances, openMinor: sumOf(balances.map(({ openMinor }) => openMinor)),
    invoices: await rowsOf(await invoicesOfFamily(db, familyId), context), payments: (await paymentsOfPayers(db, context.ability, ids)).map(toPaymentRow),
  };
}
