'use client';

import { signIn } from 'next-auth/react';
import { useEffect } from 'react';
import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import { SelectField, TextField } from '@/components/ui/inputs';
import { useActionForm } from '@/components/ui/use-action-form';
import { setUpSchema, type SetUpInput } from '@/lib/people/schema';
import { setUpSchool } from '../actions';

const DEFAULTS: SetUpInput = { schoolName: '', siteName: '', zone: '', currency: '', country: '', locale: 'en-IE', ownerName: '', ownerEmail: '', password: '' };
const LOCALES = [{ value: 'en-IE', label: '17/11/2026, €1,234.50 (Ireland)' }, { value: 'en-GB', label: '17/11/2026, £1,234.50 (Britain)' }, { value: 'en-US', label: '11/17/2026, $1,234.50 (United States)' }];
const asOptions = (values: readonly string[]) => values.map((value) => ({ value, label: value.replaceAll('_', ' ') }));

type SetUpFormProps = { zones: readonly string[]; currencies: readonly string[]; countries: readonly { value: string; label: string }[] };

export function SetUpForm({ zones, currencies, countries }: SetUpFormProps) {
  const form = useActionForm({
    schema: setUpSchema, defaultValues: DEFAULTS, send: setUpSchool,
    onDone: ({ email }) => void signIn('credentials', { email, password: form.getValues('password'), callbackUrl: '/' }),
  });
  const { setValue } = form;
  // The zone of the person's own machine, when it is on the list; known in the browser only.
  useEffect(() => {
    const own = Intl.DateTimeFormat().resolvedOptions().timeZone;
    if (zones.includes(own)) setValue('zone', own);
  }, [zones, setValue]);
  const { errors, isSubmitting, isSubmitSuccessful } = form.formState;
  const field = (name: keyof SetUpInput) => ({ ...form.register(name), error: errors[name]?.message });
  return (
    <form onSubmit={form.submit} noValidate className="flex flex-col gap-4">
      <h2 className="text-h2">The school</h2>
      <TextField label="Name of the school" autoComplete="organization" {...field('schoolName')} />
      <TextField label="Name of your first site" help="The street or the building, as you say it. More sites can follow." {...field('siteName')} />
      <SelectField label="Time zone" help="Lessons keep the clock of this place, also across summer time." placeholder="Choose a time zone" options={asOptions(zones)} {...field('zone')} />
      <div className="grid gap-4 sm:grid-cols-2">
        <SelectField label="Currency" placeholder="Choose a currency" options={asOptions(currencies)} {...field('currency')} />
        <SelectField label="Country" placeholder="Choose a country" options={countries} {...field('country')} />
      </div>
      <SelectField label="How dates and money are written" options={LOCALES} {...field('locale')} />
      <h2 className="mt-4 text-h2">The first owner</h2>
      <TextField label="Your name" autoComplete="name" {...field('ownerName')} />
      <TextField label="Your e-mail" type="email" autoComplete="username" help="You sign in with it." {...field('ownerEmail')} />
      <TextField label="Password" type="password" autoComplete="new-password" help="At least 15 characters. Three or four words with spaces are easy to remember." {...field('password')} />
      <FormError message={form.rootError} />
      <Button type="submit" kind="primary" pending={isSubmitting || isSubmitSuccessful}>Open the school</Button>
    </form>
  );
}
