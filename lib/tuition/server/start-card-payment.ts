import 'server-only';
import type * as z from 'zod';
import { findInvoice, sharesFor, type InvoiceHead, type ShareRow } from '@/db/invoice-reads';
import { instalmentsFor } from '@/db/open-items';
import { changeAttempt, findAttempt, insertAttempt, liveAttempt, type PaymentAttempt } from '@/db/payment-attempts';
import { findRecipient } from '@/db/recipients';
import { findPayer } from '@/db/payers';
import { transaction } from '@/db/transaction';
import { AppError, notFound } from '@/lib/errors';
import { sumOf } from '@/lib/money';
import { env } from '@/lib/server/env';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { assertCan } from '@/policies/ability';
import type { attemptSchema, startPaymentSchema } from '../schema';
import { cardProcessor, type CardProcessor } from './card-processor';

type Start = z.output<typeof startPaymentSchema>;

/** Seconds for which an opened page is handed out again instead of opening a new one; the processor keeps it a day. */
const PAGE_SPARE_SECONDS = 300;

/**
 * Opens the card processor's page for a payer's own share. The try and its key are on disk before the processor is
 * called, so that pressing twice, or a crash in between, opens one page and never charges twice.
 */
export async function startCardPayment({ invoiceId, what }: Start, context: Context, processor: CardProcessor = cardProcessor()): Promise<{ url: string }> {
  const { db } = context;
  const [invoice, share] = [await findInvoice(db, invoiceId), (await sharesFor(db, context.ability, [invoiceId])).find(({ payerId }) => context.actor.payerIds.includes(payerId))];
  if (!invoice || !share) throw notFound('invoice');
  assertCan(context.ability, 'create', 'Payment', { payerId: share.payerId });
  const amountMinor = await amountToPay(context, share, what);
  if (amountMinor <= 0) throw new AppError('conflict', 'This is paid already. Thank you.');
  const attempt = await transaction(db, async (trx) => {
    const live = await liveAttempt(trx, share.id);
    if (live?.amountMinor === amountMinor && isFresh(live, context.now)) return live;
    return insertAttempt(trx, { id: newId(), invoiceId, shareId: share.id, payerId: share.payerId, amountMinor, startedBy: context.actor.personId, startedAt: context.now });
  });
  if (attempt.hostedUrl) return { url: attempt.hostedUrl };
  return { url: await openPage(context, processor, { attempt, invoice, share }) };
}

const isFresh = ({ expiresAt, startedAt }: PaymentAttempt, now: number): boolean =>
  expiresAt === null ? now - startedAt < 3600 : expiresAt > now + PAGE_SPARE_SECONDS;

/** What is due now, or the next instalment when nothing is; or everything that is open. */
async function amountToPay({ db, today }: Context, share: ShareRow, what: Start['what']): Promise<number> {
  const open = (await instalmentsFor(db, [share.payerId])).filter((instalment) => instalment.shareId === share.id && instalment.openMinor > 0);
  const due = open.filter(({ dueOn }) => dueOn <= today);
  const chosen = what === 'all' ? open : due.length > 0 ? due : open.slice(0, 1);
  return sumOf(chosen.map(({ openMinor }) => openMinor));
}

type Page = { attempt: PaymentAttempt; invoice: InvoiceHead; share: ShareRow };

async function openPage(context: Context, processor: CardProcessor, { attempt, invoice, share }: Page): Promise<string> {
  const payer = await findPayer(context.db, share.payerId);
  const recipient = payer?.personId ? await findRecipient(context.db, payer.personId, 'receipt') : null;
  const home = env().NEXTAUTH_URL;
  const opened = await processor.openSession({
    attemptId: attempt.id, amountMinor: attempt.amountMinor, currency: invoice.currency, label: `${context.school.name}, invoice ${invoice.documentNo}`, email: recipient?.address ?? payer?.billingEmail ?? null,
    successUrl: `${home}/bills/paid?attempt=${attempt.id}`, cancelUrl: `${home}/bills/${invoice.id}`, idempotencyKey: attempt.idempotencyKey,
  });
  await transaction(context.db, async (trx) => {
    const current = await findAttempt(trx, attempt.id);
    const page = { sessionId: opened.sessionId, hostedUrl: opened.url, expiresAt: opened.expiresAt };
    if (current?.sessionId === null) await changeAttempt(trx, attempt.id, current.state === 'started' ? { ...page, state: 'waiting' } : page);
  });
  return opened.url;
}

export type AttemptNow = { state: 'waiting' | 'paid' | 'failed'; amountMinor: number; currency: string; invoiceId: string; documentNo: string; reason: string };

/** How a payer's own try stands, for the page they come back to. */
export async function readCardPayment({ attemptId }: z.output<typeof attemptSchema>, context: Context): Promise<AttemptNow> {
  const attempt = await findAttempt(context.db, attemptId);
  if (!attempt) throw notFound('payment');
  assertCan(context.ability, 'read', 'Payment', { payerId: attempt.payerId });
  const invoice = await findInvoice(context.db, attempt.invoiceId);
  if (!invoice) throw notFound('invoice');
  const state = attempt.state === 'paid' ? 'paid' : attempt.state === 'failed' || attempt.state === 'expired' ? 'failed' : 'waiting';
  return { state, amountMinor: attempt.amountMinor, currency: invoice.currency, invoiceId: invoice.id, documentNo: invoice.documentNo, reason: attempt.reason };
}
