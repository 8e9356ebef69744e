'use client';

import { useRouter } from 'next/navigation';
import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import { TextField } from '@/components/ui/inputs';
import { useActionForm } from '@/components/ui/use-action-form';
import { startEditionSchema } from '@/lib/ladder/schema';
import { beginEdition } from '../../actions';

export function BeginEdition() {
  const router = useRouter();
  const form = useActionForm({ schema: startEditionSchema, defaultValues: { label: 'Second edition' }, send: beginEdition, onDone: () => router.refresh() });
  return (
    <form onSubmit={(event) => void form.submit(event)} className="grid w-[min(360px,100%)] gap-3 text-left" noValidate>
      <TextField label="Name of the edition" error={form.formState.errors.label?.message} {...form.register('label')} />
      <FormError message={form.rootError} />
      <Button type="submit" kind="primary" pending={form.formState.isSubmitting}>Begin</Button>
    </form>
  );
}
