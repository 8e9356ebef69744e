'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import { TextField } from '@/components/ui/inputs';
import { useActionForm } from '@/components/ui/use-action-form';
import { resetRequestSchema } from '@/lib/people/schema';
import { askForReset } from '../actions';

export function ForgotForm() {
  const [isSent, setSent] = useState(false);
  const form = useActionForm({ schema: resetRequestSchema, defaultValues: { email: '' }, send: askForReset, onDone: () => setSent(true) });
  if (isSent) return <p role="status" className="rounded bg-felt-wash px-3 py-3 text-felt">If this address has an account, a mail with a link is on its way. The link works for one hour.</p>;
  return (
    <form onSubmit={form.submit} noValidate className="flex flex-col gap-4">
      <TextField label="E-mail" type="email" autoComplete="username" error={form.formState.errors.email?.message} {...form.register('email')} />
      <FormError message={form.rootError} />
      <Button type="submit" kind="primary" pending={form.formState.isSubmitting}>Send the link</Button>
    </form>
  );
}
