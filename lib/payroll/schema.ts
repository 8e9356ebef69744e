import * as z from 'zod';
import { isLocalDate } from '../time';

const id = z.string().min(1).max(64);
const localDate = z.string().refine(isLocalDate, 'Enter a date.');
const words = (message: string) => z.string().trim().min(3, message).max(500);

export const buildRunSchema = z.object({ month: z.string().regex(/^\d{4}-(0[1-9]|1[0-2])$/, 'Choose a month.') });
export const payRunSchema = z.object({ payRunId: id });
export const payTeacherSchema = z.object({ payRunId: id, engagementId: id });
export const sendForCheckSchema = z.object({ payRunId: id, answerByOn: localDate });
export const askSchema = z.object({ payRunId: id, engagementId: id, lineId: id.nullable(), aboutOn: localDate, text: words('Write what you would like to know.') });
export const answerSchema = z.object({ queryId: id, isAccepted: z.boolean(), answer: words('Answer in a sentence: the teacher reads it.'), amountChange: z.string().trim().max(20).default('') });
export const passOverSchema = z.object({ payRunId: id, engagementId: id, reason: words('Say why this goes on without an answer.') });
