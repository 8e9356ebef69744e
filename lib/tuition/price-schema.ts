import * as z from 'zod';
import { isLocalDate } from '../time';

const day = z.string().refine(isLocalDate, 'Enter a date.');

export const changePriceSchema = z.object({
  productId: z.string().min(1, 'Choose what is priced.').max(64),
  /** Empty: the same price whatever the length. */
  lengthMinutes: z.number().int().min(5).max(720).nullable().default(null),
  amount: z.string().trim().min(1, 'Enter the price.').max(20),
  validFrom: day,
});
export type ChangePriceInput = z.input<typeof changePriceSchema>;

export const changeTaxSchema = z
  .object({
    taxClass: z.string().min(1).max(40),
    treatment: z.enum(['exempt', 'zero', 'taxed'], 'Choose how it is taxed.'),
    ratePercent: z.number('Enter a rate in per cent.').min(0, 'Not below zero.').max(100, 'At most 100 %.').default(0),
    /** The law or the advice it rests on, as it is printed on an exempt invoice. */
    reason: z.string().trim().max(200).default(''),
    validFrom: day,
  })
  .refine(({ treatment, reason }) => treatment !== 'exempt' || reason.length > 2, { path: ['reason'], message: 'An exemption needs its reason: the law or the advice it rests on. It is printed on the invoice.' })
  .refine(({ treatment, ratePercent }) => treatment !== 'taxed' || ratePercent > 0, { path: ['ratePercent'], message: 'Enter the rate in per cent.' });
export type ChangeTaxInput = z.input<typeof changeTaxSchema>;
