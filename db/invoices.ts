import type { Bill } from '@/lib/tuition/bill';
import type { LocalDate } from '@/lib/time';
import type { Trx } from './connection';

export type NewInvoice = {
  id: string; legalEntityId: string; familyId: string; tuitionRunId: string | null; label: string; sequenceNo: number; documentNo: string;
  issuedOn: LocalDate; dueOn: LocalDate; currency: string; sellerJson: string; createdBy: string | null;
};
export type PayerNames = ReadonlyMap<string, { name: string; address: string }>;
export type Issue = { invoice: NewInvoice; bill: Bill; payers: PayerNames; newId: () => string };

/** Writes a bill as a draft with all its parts, then issues it: the database checks the sums and the number, and locks it. */
export async function issueInvoice(trx: Trx, issue: Issue): Promise<void> {
  const { invoice, bill } = issue;
  const { sequenceNo, documentNo, ...draft } = invoice;
  await trx('invoice').insert({ ...draft, netMinor: bill.netMinor, taxMinor: bill.taxMinor, totalMinor: bill.totalMinor });
  await insertLines(trx, issue);
  if (bill.taxGroups.length > 0) await trx('invoice_tax').insert(bill.taxGroups.map((group) => ({ invoiceId: invoice.id, ...group })));
  await insertShares(trx, issue);
  await trx('invoice').where({ id: invoice.id }).update({ state: 'issued', sequenceNo, documentNo });
}

async function insertLines(trx: Trx, { invoice, bill, newId }: Issue): Promise<void> {
  for (const [index, line] of bill.lines.entries()) {
    const { steps, explain, seatIds, treatment, ...row } = line;
    const id = newId();
    await trx('invoice_line').insert({ id, invoiceId: invoice.id, lineNo: index + 1, ...row, taxTreatment: treatment, explainJson: JSON.stringify(explain) });
    if (steps.length > 0) await trx('line_step').insert(steps.map((step, order) => ({ invoiceLineId: id, orderNo: order + 1, ...step })));
    if (seatIds.length > 0) await trx('invoice_line_seat').insert(seatIds.map((seatId) => ({ seatId, invoiceLineId: id })));
  }
}

async function insertShares(trx: Trx, { invoice, bill, payers, newId }: Issue): Promise<void> {
  for (const share of bill.shares) {
    const id = newId();
    const payer = payers.get(share.payerId);
    await trx('invoice_share').insert({ id, invoiceId: invoice.id, payerId: share.payerId, amountMinor: share.amountMinor, payerName: payer?.name ?? '', payerAddress: payer?.address ?? '' });
    await trx('invoice_share_part').insert(share.parts.map(({ kind, wholeMinor, amountMinor, shareBp, sentence }) => ({ shareId: id, chargeKind: kind, wholeMinor, amountMinor, shareBp, sentence })));
    await trx('instalment').insert(share.instalments.map((instalment) => ({ id: newId(), shareId: id, ...instalment })));
  }
}
