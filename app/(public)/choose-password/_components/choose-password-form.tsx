'use client';

import { useRouter } from 'next/navigation';
import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import { TextField } from '@/components/ui/inputs';
import { useActionForm } from '@/components/ui/use-action-form';
import { setPasswordSchema } from '@/lib/people/schema';
import { choosePassword } from '../../forgot-password/actions';

export function ChoosePasswordForm({ token }: { token: string }) {
  const router = useRouter();
  const form = useActionForm({ schema: setPasswordSchema, defaultValues: { token, password: '' }, send: choosePassword, onDone: () => router.push('/sign-in?chosen=1') });
  return (
    <form onSubmit={form.submit} noValidate className="flex flex-col gap-4">
      <TextField label="New password" type="password" autoComplete="new-password" error={form.formState.errors.password?.message} {...form.register('password')} />
      <FormError message={form.rootError} />
      <Button type="submit" kind="primary" pending={form.formState.isSubmitting}>Set the password</Button>
    </form>
  );
}
