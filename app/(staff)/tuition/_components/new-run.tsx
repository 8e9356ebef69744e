'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import type { UseFormRegisterReturn } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { FormError } from '@/components/ui/form-error';
import { DateField, SelectField, TextField } from '@/components/ui/inputs';
import { useActionForm } from '@/components/ui/use-action-form';
import { previewRunSchema } from '@/lib/tuition/schema';
import type { RunList } from '@/lib/tuition/server/tuition-run-screen';
import { previewRun } from '../actions';

export function NewRun({ list }: { list: RunList }) {
  const [open, setOpen] = useState(false);
  return (
    <>
      <Button kind="primary" onClick={() => setOpen(true)}>Work out bills</Button>
      <Dialog open={open} onOpenChange={setOpen} title="Work out bills" description="Every family’s bill is worked out and kept for you to look at. Nothing is sent.">
        <NewRunForm list={list} onCancel={() => setOpen(false)} />
      </Dialog>
    </>
  );
}

function NewRunForm({ list, onCancel }: { list: RunList; onCancel: () => void }) {
  const router = useRouter();
  const firstTerm = list.terms[0]?.id ?? '';
  const form = useActionForm({
    schema: previewRunSchema, send: previewRun, onDone: ({ runId }) => router.push(`/tuition/${runId}`),
    defaultValues: { kind: 'term', period: firstTerm, dueOn: list.suggestedDueOn, instalments: 1, depositPercent: 0 },
  });
  const { errors, isSubmitting } = form.formState;
  const kind = form.watch('kind');
  const pickKind = (value: string) => {
    form.setValue('kind', value === 'month' ? 'month' : 'term');
    form.setValue('period', value === 'month' ? list.today.slice(0, 7) : firstTerm);
  };
  return (
    <form onSubmit={form.submit} noValidate className="flex flex-col gap-4">
      <SelectField label="What is billed" value={kind} onChange={(event) => pickKind(event.target.value)} options={[{ value: 'term', label: 'A term' }, { value: 'month', label: 'A month' }]} error={errors.kind?.message} />
      <PeriodField isTerm={kind === 'term'} terms={list.terms} error={errors.period?.message} input={form.register('period')} />
      <DateField label="Due on" help="Saturdays and Sundays move to Monday." error={errors.dueOn?.message} {...form.register('dueOn')} />
      <div className="grid gap-4 sm:grid-cols-2">
        <TextField label="Instalments" type="number" min={1} max={12} error={errors.instalments?.message} {...form.register('instalments')} />
        <TextField label="Deposit, %" type="number" min={0} max={100} help="Due with the first instalment." error={errors.depositPercent?.message} {...form.register('depositPercent')} />
      </div>
      <FormError message={form.rootError} />
      <div className="flex justify-end gap-3">
        <Button onClick={onCancel}>Leave it</Button>
        <Button type="submit" kind="primary" pending={isSubmitting}>Work them out</Button>
      </div>
    </form>
  );
}

type PeriodFieldProps = { isTerm: boolean; terms: RunList['terms']; error: string | undefined; input: UseFormRegisterReturn };

function PeriodField({ isTerm, terms, error, input }: PeriodFieldProps) {
  if (!isTerm) return <TextField label="Month" type="month" error={error} {...input} />;
  return <SelectField label="Term" options={terms.map(({ id, label }) => ({ value: id, label }))} placeholder={terms.length === 0 ? 'No term ahead: set one up first' : undefined} error={error} {...input} />;
}
