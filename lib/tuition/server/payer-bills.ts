import 'server-only';
import type * as z from 'zod';
import { findInvoice, linesOfInvoice, ownShares, partsOfShares, settledOfShares, sharesFor, type InvoiceHead, type LineRow, type PartRow, type ShareRow } from '@/db/invoice-reads';
import { creditOfPayers, instalmentsFor, type OpenInstalment } from '@/db/open-items';
import { allocationsOf, paymentsOfPayers } from '@/db/payments';
import { notFound } from '@/lib/errors';
import { sumOf } from '@/lib/money';
import type { Context } from '@/lib/server/context';
import type { LocalDate } from '@/lib/time';
import type { invoiceSchema } from '../schema';
import { shareStateOf, type ShareState } from '../share-state';

export type BillRow = { invoiceId: string; documentNo: string; label: string; issuedOn: LocalDate; amountMinor: number; openMinor: number; /** What is due by today, or the next instalment when nothing is. */ dueNowMinor: number; nextDueOn: LocalDate | null; state: ShareState; currency: string };
export type OwnPayment = { id: string; receiptNo: string; receivedOn: LocalDate; amountMinor: number; method: string; cardLast4: string | null; currency: string; steps: string[] };
export type PayerBills = { bills: BillRow[]; payments: OwnPayment[]; openMinor: number; overdueMinor: number; creditMinor: number; currency: string; nextDue: BillRow | null };

/** Everything a payer is asked to pay, newest first: their own shares and payments and nothing else. */
export async function payerBills(context: Context): Promise<PayerBills> {
  const { db, ability, actor, school } = context;
  const shares = await ownShares(db, ability, actor.payerIds);
  const instalments = await instalmentsFor(db, actor.payerIds);
  const settled = await settledOfShares(db, shares.map(({ id }) => id));
  const bills = shares.map((share): BillRow => {
    const { invoiceId, documentNo, label, issuedOn, amountMinor, currency } = share;
    return { invoiceId, documentNo, label, issuedOn, amountMinor, currency, ...standing(share, instalments, settled, context.today) };
  });
  const due = bills.filter(({ openMinor }) => openMinor > 0).sort((a, b) => (a.nextDueOn ?? '').localeCompare(b.nextDueOn ?? ''));
  return {
    bills, payments: await ownPayments(context), nextDue: due[0] ?? null, currency: shares[0]?.currency ?? school.currency, openMinor: sumOf(bills.map(({ openMinor }) => openMinor)),
    overdueMinor: sumOf(instalments.filter(({ dueOn, openMinor }) => openMinor > 0 && dueOn < context.today).map(({ openMinor }) => openMinor)),
    creditMinor: sumOf([...(await creditOfPayers(db, actor.payerIds)).values()]),
  };
}

type Settled = Map<string, { paidMinor: number; creditedMinor: number }>;

/** What is still open of a share, when it is due, and its state in one word. */
export function standing(share: Pick<ShareRow, 'id' | 'amountMinor'>, instalments: readonly OpenInstalment[], settled: Settled, today: LocalDate): Pick<BillRow, 'openMinor' | 'dueNowMinor' | 'nextDueOn' | 'state'> {
  const open = instalments.filter(({ shareId, openMinor }) => shareId === share.id && openMinor > 0);
  const nextDueOn = open[0]?.dueOn ?? null;
  const { paidMinor, creditedMinor } = settled.get(share.id) ?? { paidMinor: 0, creditedMinor: 0 };
  const due = open.filter(({ dueOn }) => dueOn <= today);
  const dueNowMinor = sumOf((due.length > 0 ? due : open.slice(0, 1)).map(({ openMinor }) => openMinor));
  return { openMinor: sumOf(open.map(({ openMinor }) => openMinor)), dueNowMinor, nextDueOn, state: shareStateOf({ amountMinor: share.amountMinor, paidMinor, creditedMinor, nextDueOn }, today) };
}

async function ownPayments({ db, ability, actor }: Context): Promise<OwnPayment[]> {
  const payments = await paymentsOfPayers(db, ability, actor.payerIds);
  const allocations = await allocationsOf(db, payments.map(({ id }) => id));
  return payments.map(({ id, receiptDocumentNo, receivedOn, amountMinor, method, cardLast4, currency }) => ({
    id, receiptNo: receiptDocumentNo ?? '', receivedOn, amountMinor, method, cardLast4, currency, steps: allocations.filter(({ paymentId }) => paymentId === id).map(({ sentence }) => sentence),
  }));
}

export type PayerInvoice = Pick<InvoiceHead, 'documentNo' | 'label' | 'issuedOn' | 'currency'> & {
  invoiceId: string; seller: Seller; payerName: string; payerAddress: string; amountMinor: number;
  lines: { text: string; amountMinor: number; steps: string[] }[];
  parts: { sentence: string; amountMinor: number }[];
  instalments: { instalmentNo: number; dueOn: LocalDate; amountMinor: number; openMinor: number }[];
} & Pick<BillRow, 'openMinor' | 'dueNowMinor' | 'nextDueOn' | 'state'>;
export type Seller = { name: string; addressLines: string; taxNumber: string | null };

/** One invoice as its payer sees it: the lines that they pay towards, their part, and what is left to pay. */
export async function payerInvoice({ invoiceId }: z.output<typeof invoiceSchema>, context: Context): Promise<PayerInvoice> {
  const { db, ability, actor } = context;
  const share = (await sharesFor(db, ability, [invoiceId])).find(({ payerId }) => actor.payerIds.includes(payerId));
  const invoice = share && (await findInvoice(db, invoiceId));
  if (!share || !invoice) throw notFound('invoice');
  const parts = await partsOfShares(db, [share.id]);
  const instalments = (await instalmentsFor(db, [share.payerId])).filter(({ shareId }) => shareId === share.id);
  const lines = (await linesOfInvoice(db, invoiceId)).filter((line) => parts.some(({ chargeKind }) => chargeKind === line.chargeKind));
  return {
    invoiceId, documentNo: invoice.documentNo, label: invoice.label, issuedOn: invoice.issuedOn, currency: invoice.currency, seller: JSON.parse(invoice.sellerJson) as Seller,
    payerName: share.payerName, payerAddress: share.payerAddress, amountMinor: share.amountMinor, lines: lines.map((line) => payerLine(line, context)),
    parts: parts.map(({ sentence, amountMinor }: PartRow) => ({ sentence, amountMinor })),
    instalments: instalments.map(({ instalmentNo, dueOn, amountMinor, openMinor }) => ({ instalmentNo, dueOn, amountMinor, openMinor })),
    ...standing(share, instalments, await settledOfShares(db, [share.id]), context.today),
  };
}

/** A scholarship is the business of the child's own guardians; to any other payer it is an agreed reduction. */
function payerLine({ text, netMinor, taxMinor, explainJson, studentId }: LineRow, { actor }: Context): PayerInvoice['lines'][number] {
  const steps = JSON.parse(explainJson) as string[];
  const mayKnow = studentId !== null && actor.studentIds.includes(studentId);
  return { text, amountMinor: netMinor + taxMinor, steps: mayKnow ? steps : steps.map((step) => step.replace(/^Scholarship, [\d.]+ %/, 'Agreed reduction')) };
}
