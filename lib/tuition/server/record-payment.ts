import 'server-only';
import { recordAudit, type AuditActor } from '@/db/audit';
import type { Trx } from '@/db/connection';
import { postJournal } from '@/db/journal';
import { takeNumber } from '@/db/number-series';
import { openItemsOf } from '@/db/open-items';
import type { Payer } from '@/db/payers';
import { insertAllocations, insertPayment, type PaymentMethod } from '@/db/payments';
import type { School } from '@/db/school';
import { say, type MoneyWords } from '@/lib/explained';
import { formatDate } from '@/lib/format';
import { sumOf } from '@/lib/money';
import { queueMail } from '@/lib/messages/server/queue-mail';
import { newId } from '@/lib/server/ids';
import type { LocalDate } from '@/lib/time';
import { allocate, type AllocationResult } from '../allocation';
import { journalOfPayment } from '../journal';
import { METHOD_WORDS } from '../schema';

export type PaymentMoment = AuditActor & { school: Pick<School, 'name' | 'locale'> };
export type Received = {
  payer: Payer; amountMinor: number; method: PaymentMethod; receivedOn: LocalDate; externalKey: string; note: string;
  /** The share that the payer chose to pay comes first. */
  shareId: string | null; cardBrand: string | null; cardLast4: string | null;
};
export type RecordedPayment = AllocationResult & { paymentId: string; receiptNo: string; steps: string[] };

/**
 * Money has come in: payment with its receipt number, allocation by the school's rule, books, receipt mail and audit,
 * inside the caller's transaction. The external key is unique, so the same money is never recorded twice.
 */
export async function recordPayment(trx: Trx, moment: PaymentMoment, received: Received): Promise<RecordedPayment> {
  const { payer, amountMinor } = received;
  const words: MoneyWords = { currency: payer.currency, locale: moment.school.locale };
  const items = await openItemsOf(trx, payer.id);
  const preferred = new Set(items.filter(({ shareId }) => shareId !== null && shareId === received.shareId).map(({ id }) => id));
  const { value, steps } = allocate(amountMinor, items, words, preferred);
  const receipt = await takeNumber(trx, payer.legalEntityId, 'receipt');
  const paymentId = newId();
  await insertPayment(trx, {
    id: paymentId, legalEntityId: payer.legalEntityId, payerId: payer.id, amountMinor, currency: payer.currency, method: received.method, receivedOn: received.receivedOn,
    receivedAt: moment.now, externalKey: received.externalKey, receiptNo: receipt.sequenceNo, receiptDocumentNo: receipt.documentNo, cardBrand: received.cardBrand,
    cardLast4: received.cardLast4, siteId: null, note: received.note, takenBy: moment.actor?.personId ?? null,
  });
  await insertAllocations(trx, value.allocations.map(({ itemId, kind, amountMinor: part, sentence }) => ({
    id: newId(), payerId: payer.id, paymentId, instalmentId: kind === 'instalment' ? itemId : null, lateFeeId: kind === 'late_fee' ? itemId : null, amountMinor: part, madeOn: received.receivedOn, sentence,
  })));
  const entry = { id: newId(), legalEntityId: payer.legalEntityId, postedOn: received.receivedOn, documentKind: 'payment' as const, documentId: paymentId, memo: `Receipt ${receipt.documentNo}`, currency: payer.currency };
  const allocatedMinor = sumOf(value.allocations.map((allocation) => allocation.amountMinor));
  await postJournal(trx, entry, journalOfPayment({ amountMinor, allocatedMinor, isCash: received.method === 'cash' }), payer.familyId);
  const recorded = { paymentId, receiptNo: receipt.documentNo, steps, ...value };
  await mailReceipt(trx, moment, received, recorded);
  await recordAudit(trx, moment, {
    action: 'receive', tableName: 'payment', rowId: paymentId, after: { amountMinor, method: received.method },
    sentence: `Received ${say(amountMinor, words)} by ${METHOD_WORDS[received.method]} from ${payer.name}, receipt ${receipt.documentNo}.`,
  });
  return recorded;
}

async function mailReceipt(trx: Trx, moment: PaymentMoment, { payer, amountMinor, method, receivedOn, cardBrand, cardLast4 }: Received, recorded: RecordedPayment): Promise<void> {
  const to = payer.personId ? { personId: payer.personId } : payer.billingEmail ? { name: payer.name, address: payer.billingEmail } : null;
  if (!to) return;
  const words = { currency: payer.currency, locale: moment.school.locale };
  const card = cardLast4 ? ` (${cardBrand ?? 'card'} ending ${cardLast4})` : '';
  await queueMail(trx, moment, to, {
    topic: 'receipt', key: `receipt:${recorded.paymentId}`, subjectRef: recorded.paymentId, subject: `Receipt ${recorded.receiptNo}`,
    lines: [`We received ${say(amountMinor, words)} by ${METHOD_WORDS[method]}${card} on ${formatDate(receivedOn, words.locale, 'full')}. Thank you.`, ...recorded.steps],
  });
}
