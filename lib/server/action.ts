import 'server-only';
import { headers } from 'next/headers';
import type * as z from 'zod';
import { AppError, type FieldMessages } from '@/lib/errors';
import { requireContext, type Context } from './context';
import { assertOwnOrigin } from './origin';

export type ActionResult<T> = { ok: true; data: T } | { ok: false; message: string; fields: FieldMessages };

/** The one door for writes: who is asking, is the input sound, do the work, say what went wrong. */
export function action<S extends z.ZodType, T>(schema: S, work: (input: z.output<S>, context: Context) => Promise<T>) {
  return async (raw: z.input<S>): Promise<ActionResult<T>> => {
    const context = await requireContext();
    return answering(schema, raw, (input) => work(input, context));
  };
}

/** The same door for people who are not signed in: the trial enquiry, an invitation, the first-run set-up. */
export function publicAction<S extends z.ZodType, T>(schema: S, work: (input: z.output<S>) => Promise<T>) {
  return (raw: z.input<S>): Promise<ActionResult<T>> => answering(schema, raw, work);
}

async function answering<S extends z.ZodType, T>(schema: S, raw: unknown, work: (input: z.output<S>) => Promise<T>): Promise<ActionResult<T>> {
  try {
    assertOwnOrigin((await headers()).get('origin'));
    const input = schema.safeParse(raw);
    if (!input.success) return refused(input.error);
    return { ok: true, data: await work(input.data) };
  } catch (error) {
    if (error instanceof AppError) return { ok: false, message: error.message, fields: error.fields };
    throw error;
  }
}

function refused(error: z.ZodError): { ok: false; message: string; fields: FieldMessages } {
  const fields: FieldMessages = {};
  for (const { path, message } of error.issues) (fields[path.join('.')] ??= []).push(message);
  return { ok: false, message: fields['']?.[0] ?? 'Check the marked fields.', fields };
}
