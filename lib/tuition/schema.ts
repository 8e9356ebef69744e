import * as z from 'zod';
import { isLocalDate } from '../time';

const localDate = z.string().refine(isLocalDate, 'Enter a date.');
const id = z.string().min(1).max(64);
const words = (message: string) => z.string().trim().min(3, message).max(300);

export const previewRunSchema = z.object({
  kind: z.enum(['term', 'month'], 'Choose a term or a month.'),
  /** The term's id, or the month as 2026-11. */
  period: z.string().min(1, 'Choose what is billed.').max(64),
  dueOn: localDate,
  instalments: z.coerce.number('Enter a number of instalments.').int().min(1, 'At least one.').max(12, 'At most twelve.').default(1),
  depositPercent: z.coerce.number().min(0).max(100).default(0),
});
export const releaseRunSchema = z.object({ runId: id, controlTotalMinor: z.number().int() });
export const holdFamilySchema = z.object({ runId: id, familyId: id, reason: words('Say why, so that a colleague understands it.') });
export const unholdFamilySchema = z.object({ runId: id, familyId: id });

export const invoiceSchema = z.object({ invoiceId: id });
export const familySchema = z.object({ familyId: id });
export const startPaymentSchema = z.object({ invoiceId: id, what: z.enum(['due', 'all']).default('due') });
export const attemptSchema = z.object({ attemptId: id });

export const DESK_METHODS = ['cash', 'transfer', 'cheque'] as const;
export const METHOD_WORDS: Record<(typeof DESK_METHODS)[number] | 'card' | 'opening', string> = { cash: 'cash', transfer: 'bank transfer', cheque: 'cheque', card: 'card', opening: 'opening balance' };
export const deskPaymentSchema = z.object({
  payerId: z.string().min(1, 'Choose who pays.').max(64),
  /** As typed; read in the currency of the family. */
  amount: z.string().trim().min(1, 'Enter the amount.').max(20),
  method: z.enum(DESK_METHODS, 'Choose how it was paid.'),
  receivedOn: localDate,
  note: z.string().trim().max(200).default(''),
  /** Made once per opened form, so that pressing twice takes one payment. */
  requestKey: z.string().min(8).max(64),
});
