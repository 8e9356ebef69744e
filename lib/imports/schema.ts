import * as z from 'zod';
import { isLocalDate } from '../time';
import { SHEET_KINDS } from './columns';

const date = z.string().refine(isLocalDate, 'Enter a date.');
const id = z.string().min(1).max(64);

const newTermSchema = z.object({ name: z.string().trim().min(1, 'Name the term, for example Autumn term.').max(60), startsOn: date, endsOn: date })
  .refine(({ startsOn, endsOn }) => startsOn < endsOn, { path: ['endsOn'], message: 'The last day comes after the first.' });

/** What a workbook does not say and the person who brings it in decides. */
const importChoicesSchema = z.object({
  siteId: id,
  /** How the teachers of the workbook are engaged: a decision of the owner, never guessed. */
  engagementKind: z.enum(['employee', 'contractor']).nullable(),
  termId: id.nullable(),
  newTerm: newTermSchema.nullable(),
  /** The first day on which a lesson is laid; what was taught before stays in the old books. */
  lessonsFrom: date.nullable(),
});
export type ImportChoices = z.output<typeof importChoicesSchema>;

const sheetMappingSchema = z.object({
  sheet: z.string().max(120), kind: z.enum(SHEET_KINDS).nullable(), headingRow: z.number().int().min(1).max(5000),
  places: z.record(z.string().max(40), z.number().int().min(0).max(100).nullable()), dateOrder: z.enum(['day_first', 'month_first']).nullable(),
});

export const importSettingsSchema = z.object({ mapping: z.array(sheetMappingSchema).max(40), choices: importChoicesSchema });
export type ImportSettings = z.output<typeof importSettingsSchema>;

export const importRefSchema = z.object({ batchId: id });
export const checkAgainSchema = importRefSchema.extend({ choices: importChoicesSchema, mapping: z.array(sheetMappingSchema).max(40).optional() });
export const uploadSchema = z.object({ file: z.instanceof(File, { message: 'Choose a workbook.' }) });
