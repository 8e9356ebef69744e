'use client';

import { signIn } from 'next-auth/react';
import Link from 'next/link';
import { useState, type FormEvent } from 'react';
import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import { TextField } from '@/components/ui/inputs';

const REFUSED = 'The address or the password is not right, or there were too many tries. Wait a quarter of an hour, or ask for a new password below.';

export function SignInForm({ hasFailed }: { hasFailed: boolean }) {
  const [pending, setPending] = useState(false);
  const [message, setMessage] = useState(hasFailed ? REFUSED : undefined);
  const onSubmit = async (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const form = new FormData(event.currentTarget);
    setPending(true);
    setMessage(undefined);
    const result = await signIn('credentials', { email: form.get('email'), password: form.get('password'), redirect: false }).catch(() => null);
    if (result?.ok && !result.error) return window.location.assign('/');
    setMessage(result ? REFUSED : 'This did not reach the school. Check your connection and press again.');
    setPending(false);
  };
  return (
    <form onSubmit={onSubmit} className="flex flex-col gap-4" aria-label="Sign in">
      <TextField label="E-mail" name="email" type="email" autoComplete="username" required autoCapitalize="none" spellCheck={false} />
      <TextField label="Password" name="password" type="password" autoComplete="current-password" required />
      <FormError message={message} />
      <Button type="submit" kind="primary" pending={pending}>Sign in</Button>
      <p className="flex flex-wrap justify-between gap-3">
        <Link href="/forgot-password" className="text-petrol">Forgotten the password?</Link>
        <Link href="/trial" className="text-petrol">Ask for a trial lesson</Link>
      </p>
    </form>
  );
}
