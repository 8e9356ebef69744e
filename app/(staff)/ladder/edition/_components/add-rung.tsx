'use client';

import { Plus } from 'lucide-react';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { FormError } from '@/components/ui/form-error';
import { SelectField, TextField } from '@/components/ui/inputs';
import { useActionForm } from '@/components/ui/use-action-form';
import { addRungSchema } from '@/lib/ladder/schema';
import { putRung } from '../../actions';

type Choice = { id: string; label: string; isNew: boolean };

/** A rung behind another: split from one that is there, or wholly new. */
export function AddRung({ rungs }: { rungs: readonly Choice[] }) {
  const router = useRouter();
  const [open, setOpen] = useState(false);
  const form = useActionForm({
    schema: addRungSchema, defaultValues: { code: '', afterRungId: rungs.at(-1)?.id ?? '', fromRungId: '' }, send: putRung,
    onDone: ({ rungId }) => router.push(`/ladder/edition/${rungId}`),
  });
  const { errors, isSubmitting } = form.formState;
  const options = rungs.map(({ id, label }) => ({ value: id, label }));
  return (
    <>
      <Button icon={<Plus size={16} aria-hidden />} onClick={() => setOpen(true)}>Add a rung</Button>
      <Dialog open={open} onOpenChange={setOpen} title="Add a rung" description="It begins with what the rung before it asks; change it then.">
        <form onSubmit={(event) => void form.submit(event)} className="grid gap-4" noValidate>
          <TextField label="Code" placeholder="4.3a" help="A code is given once and never again." error={errors.code?.message} {...form.register('code')} />
          <SelectField label="Behind" options={options} error={errors.afterRungId?.message} {...form.register('afterRungId')} />
          <SelectField label="Split from" placeholder="Nothing: wholly new" options={rungs.filter(({ isNew }) => !isNew).map(({ id, label }) => ({ value: id, label }))} help="Whoever has that one is credited this one." {...form.register('fromRungId')} />
          <FormError message={form.rootError} />
          <Button type="submit" kind="primary" pending={isSubmitting}>Add it</Button>
        </form>
      </Dialog>
    </>
  );
}
