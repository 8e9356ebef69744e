'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useForm, type DefaultValues, type FieldValues, type Path, type UseFormReturn } from 'react-hook-form';
import type * as z from 'zod';
import type { FieldMessages } from '@/lib/errors';

type Result<T> = { ok: true; data: T } | { ok: false; message: string; fields: FieldMessages };
type Options<Input extends FieldValues, Output, T> = {
  schema: z.ZodType<Output, Input>;
  defaultValues: DefaultValues<Input>;
  send: (input: Output) => Promise<Result<T>>;
  onDone?: (data: T) => void;
};

/**
 * A form bound to a server action: the same schema checks before sending, the server's words land on their
 * fields, and nothing typed is lost when it refuses or the line breaks.
 */
export function useActionForm<Input extends FieldValues, Output, T>({ schema, defaultValues, send, onDone }: Options<Input, Output, T>): UseFormReturn<Input, unknown, Output> & { submit: (event?: React.BaseSyntheticEvent) => Promise<void>; rootError: string | undefined } {
  const form = useForm<Input, unknown, Output>({ resolver: zodResolver(schema), defaultValues });
  const submit = form.handleSubmit(async (values) => {
    const result = await send(values).catch(() => null);
    if (result?.ok) return onDone?.(result.data);
    if (!result) return form.setError('root', { message: 'This did not reach the school. Check your connection and press again; nothing you typed is lost.' });
    for (const [name, messages] of Object.entries(result.fields)) {
      if (name !== '' && messages?.[0]) form.setError(name as Path<Input>, { message: messages[0] });
    }
    form.setError('root', { message: result.message });
  });
  return { ...form, submit, rootError: form.formState.errors.root?.message };
}
