import 'server-only';
import type * as z from 'zod';
import { openItemsOf } from '@/db/open-items';
import { findPayer, livePayers, type Payer } from '@/db/payers';
import { paymentByKey } from '@/db/payments';
import { transaction } from '@/db/transaction';
import { say } from '@/lib/explained';
import { AppError, notFound } from '@/lib/errors';
import { isAmbiguousAmount, parseMoney, sumOf } from '@/lib/money';
import type { Context } from '@/lib/server/context';
import { addDays } from '@/lib/time';
import { assertCan } from '@/policies/ability';
import { allocate, type OpenItem } from '../allocation';
import type { deskPaymentSchema } from '../schema';
import { recordPayment } from './record-payment';

type Taking = z.output<typeof deskPaymentSchema>;
export type Taken = { receiptNo: string; steps: string[] };

/** Money taken at the desk: cash, a transfer seen on the bank statement, a cheque. The same form sent twice takes it once. */
export async function takeDeskPayment(input: Taking, context: Context): Promise<Taken> {
  const payer = await findPayer(context.db, input.payerId);
  if (!payer) throw notFound('payer');
  // A payer may pay by card; that money was handed over at the desk is for the office to say.
  assertCan(context.ability, 'manage', 'Payment', { payerId: payer.id });
  const amountMinor = amountOf(input.amount, payer);
  if (input.receivedOn > context.today) throw new AppError('invalid', 'A payment cannot come from the future.', { receivedOn: ['Choose today or an earlier day.'] });
  if (input.receivedOn < addDays(context.today, -366)) throw new AppError('invalid', 'This day is more than a year ago.', { receivedOn: ['Check the year.'] });
  const externalKey = `desk:${input.requestKey}`;
  return transaction(context.db, async (trx) => {
    const known = await paymentByKey(trx, externalKey);
    if (known) return { receiptNo: known.receiptDocumentNo ?? '', steps: [] };
    const { receiptNo, steps } = await recordPayment(trx, context, {
      payer, amountMinor, method: input.method, receivedOn: input.receivedOn, externalKey, note: input.note, shareId: null, cardBrand: null, cardLast4: null,
    });
    return { receiptNo, steps };
  });
}

function amountOf(typed: string, payer: Payer): number {
  if (isAmbiguousAmount(typed, payer.currency)) throw new AppError('invalid', 'The amount can be read in two ways.', { amount: ['Write it with its cents, like 12345.00 or 12.34.'] });
  const amountMinor = parseMoney(typed, payer.currency);
  if (amountMinor === null) throw new AppError('invalid', 'The amount was not understood.', { amount: ['Write it like 120 or 120.50.'] });
  if (amountMinor <= 0) throw new AppError('invalid', 'The amount must be more than nothing.', { amount: ['Enter what was paid.'] });
  return amountMinor;
}

export type PayerChoice = { payerId: string; name: string; familyId: string; familyName: string; currency: string };
export const payerChoices = async (context: Context): Promise<PayerChoice[]> => {
  assertCan(context.ability, 'read', 'Payment', {});
  return (await livePayers(context.db)).map(({ id, name, familyId, familyName, currency }) => ({ payerId: id, name, familyId, familyName, currency }));
};

export type DeskPreview = { openMinor: number; currency: string; items: Pick<OpenItem, 'label' | 'dueOn' | 'openMinor'>[]; steps: string[] };

/** What a payer owes, and what an amount would settle, before it is taken. */
export async function previewDeskPayment({ payerId, amount }: { payerId: string; amount: string }, context: Context): Promise<DeskPreview> {
  const payer = await findPayer(context.db, payerId);
  if (!payer) throw notFound('payer');
  assertCan(context.ability, 'read', 'Payment', { payerId });
  const items = await openItemsOf(context.db, payerId);
  const words = { currency: payer.currency, locale: context.school.locale };
  const amountMinor = parseMoney(amount, payer.currency) ?? 0;
  const openMinor = sumOf(items.map((item) => item.openMinor));
  const steps = amountMinor > 0 ? allocate(amountMinor, items, words).steps : [`Open: ${say(openMinor, words)}`];
  return { openMinor, currency: payer.currency, items: items.map(({ label, dueOn, openMinor: open }) => ({ label, dueOn, openMinor: open })), steps };
}
