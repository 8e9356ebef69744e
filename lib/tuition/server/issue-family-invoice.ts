import 'server-only';
import { recordAudit } from '@/db/audit';
import type { Trx } from '@/db/connection';
import { issueInvoice } from '@/db/invoices';
import { postJournal } from '@/db/journal';
import { findLegalEntity } from '@/db/legal-entities';
import { takeNumber } from '@/db/number-series';
import { payersOfFamilies, type Payer } from '@/db/payers';
import { markItemReleased, type ItemWithFamily, type TuitionRun } from '@/db/tuition-runs';
import { say } from '@/lib/explained';
import { formatDate } from '@/lib/format';
import { queueMail } from '@/lib/messages/server/queue-mail';
import { env } from '@/lib/server/env';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import type { Bill, BillShare } from '../bill';
import { journalOfInvoice } from '../journal';

/** Turns one worked-out bill into an issued invoice, inside the caller's transaction. */
export async function issueFamilyInvoice(trx: Trx, context: Context, run: TuitionRun, item: ItemWithFamily): Promise<void> {
  const bill = JSON.parse(item.billJson) as Bill;
  const entity = await findLegalEntity(trx, item.legalEntityId);
  if (!entity) throw new Error('a family needs a legal entity');
  const payers = new Map((await payersOfFamilies(trx, [item.familyId])).map((payer) => [payer.id, payer]));
  const number = await takeNumber(trx, entity.id, 'invoice');
  const invoiceId = newId();
  const { name, country, taxNumber, addressLines } = entity;
  await issueInvoice(trx, {
    bill, payers, newId,
    invoice: {
      id: invoiceId, legalEntityId: entity.id, familyId: item.familyId, tuitionRunId: run.id, label: run.label, ...number, issuedOn: context.today, dueOn: run.dueOn,
      currency: item.currency, sellerJson: JSON.stringify({ name, country, taxNumber, addressLines }), createdBy: context.actor.personId,
    },
  });
  const entry = { id: newId(), legalEntityId: entity.id, postedOn: context.today, documentKind: 'invoice' as const, documentId: invoiceId, memo: `Invoice ${number.documentNo}`, currency: item.currency };
  await postJournal(trx, entry, journalOfInvoice(bill), item.familyId);
  for (const share of bill.shares) await mailShare(trx, context, { share, payer: payers.get(share.payerId), invoiceId, run, currency: item.currency, documentNo: number.documentNo });
  await markItemReleased(trx, item.id, invoiceId);
  await recordAudit(trx, context, {
    action: 'issue', tableName: 'invoice', rowId: invoiceId, after: { documentNo: number.documentNo, totalMinor: bill.totalMinor },
    sentence: `Issued invoice ${number.documentNo} to family ${item.familyName}: ${say(bill.totalMinor, { currency: item.currency, locale: context.school.locale })}.`,
  });
}

type Mailing = { share: BillShare; payer: Payer | undefined; invoiceId: string; run: TuitionRun; currency: string; documentNo: string };

/** Each payer reads of their own share and of nobody else's. */
async function mailShare(trx: Trx, context: Context, { share, payer, invoiceId, run, currency, documentNo }: Mailing): Promise<void> {
  const to = payer?.personId ? { personId: payer.personId } : payer?.billingEmail ? { name: payer.name, address: payer.billingEmail } : null;
  if (!to) return;
  const words = { currency, locale: context.school.locale };
  const dues = share.instalments.filter(({ amountMinor }) => amountMinor > 0).map(({ dueOn, amountMinor }) => `${say(amountMinor, words)} by ${formatDate(dueOn, words.locale, 'full')}`);
  await queueMail(trx, context, to, {
    topic: 'invoice', key: `invoice:${invoiceId}:${share.payerId}`, subjectRef: invoiceId, subject: `Invoice ${documentNo}, ${run.label}`,
    lines: [
      `Your invoice ${documentNo} for ${run.label} is ready: ${say(share.amountMinor, words)}.`,
      ...share.parts.map(({ sentence }) => sentence),
      ...(dues.length > 0 ? [`Please pay ${dues.join(', ')}.`] : ['There is nothing to pay.']),
      'Every line of the invoice opens to show how it was worked out.',
    ],
    link: { label: 'Open the invoice', url: `${env().NEXTAUTH_URL}/bills/${invoiceId}` },
  });
}
