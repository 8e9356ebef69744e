import * as z from 'zod';
import { isLocalDate } from '../time';
import { MARKS } from './attendance';
import { consequenceSchema } from './consequences';

const daySchema = z.string().refine(isLocalDate, 'Enter a date that exists.');

export const changeConsequenceSchema = z.object({ mark: z.enum(MARKS), consequence: consequenceSchema, validFrom: daySchema });

/** "62.5" and "62,5" are 6250 basis points; read as digits, never as a fraction. */
const percentSchema = z.string().trim().regex(/^\d{1,3}([.,]\d{1,2})?\s*%?$/, { error: 'Enter per cent, such as 50 or 62.5.', abort: true })
  .transform((text) => { const [whole = '', part = ''] = text.replace('%', '').trim().split(/[.,]/); return Number(whole + part.padEnd(2, '0')); })
  .refine((shareBp) => shareBp <= 10_000, 'At most 100 %.');

/** The same change as it is typed: shares in per cent. */
export const consequenceFormSchema = z
  .object({ mark: z.enum(MARKS), charged: z.boolean(), credit: consequenceSchema.shape.credit, employee: percentSchema, contractor: percentSchema, drawsPackage: z.boolean(), validFrom: daySchema })
  .transform(({ mark, validFrom, employee, contractor, ...rest }) => ({ mark, validFrom, consequence: { ...rest, payBp: { employee, contractor } } }));
