'use client';

import { Plus } from 'lucide-react';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { useFieldArray } from 'react-hook-form';
import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { FormError } from '@/components/ui/form-error';
import { DateField } from '@/components/ui/inputs';
import { useActionForm } from '@/components/ui/use-action-form';
import { setPracticeSchema } from '@/lib/ladder/schema';
import type { RungChoice, StaffPractice } from '@/lib/ladder/server/practice-for-staff';
import type { LocalDate } from '@/lib/time';
import { givePractice } from '../actions';
import { PracticeItemFields } from './practice-item-fields';

const KEYS_AT_FIRST = 3;
const MOST_ITEMS = 8;
const MINUTES_AT_FIRST = 10;

const itemFor = (choice: RungChoice | undefined) => ({ rungId: choice?.id ?? '', piece: '', keys: choice?.keyPool.slice(0, KEYS_AT_FIRST) ?? [], beatsPerMinute: choice?.beatsPerMinute ?? null, minutes: MINUTES_AT_FIRST, howRight: '' });

/** The next rung in its first keys stands there already: two presses for the usual week. */
export function SetPractice({ practice: { studentId, firstName, choices, nextRungId }, dueOn }: { practice: StaffPractice; dueOn: LocalDate }) {
  const router = useRouter();
  const [open, setOpen] = useState(false);
  const form = useActionForm({
    schema: setPracticeSchema, defaultValues: { studentId, dueOn, items: [itemFor(choices.find(({ id }) => id === nextRungId))] }, send: givePractice,
    onDone: () => { setOpen(false); toast.success(`${firstName} finds it under Practice.`); router.refresh(); },
  });
  const { fields, append, remove } = useFieldArray({ control: form.control, name: 'items' });
  const { errors, isSubmitting } = form.formState;
  return (
    <>
      <Button onClick={() => setOpen(true)}>Set practice</Button>
      <Dialog open={open} onOpenChange={setOpen} title={`Practice for ${firstName}`} description="It takes the place of what is set now.">
        <form onSubmit={(event) => void form.submit(event)} className="grid gap-4" noValidate>
          {fields.map((field, at) => <PracticeItemFields key={field.id} form={form} at={at} choices={choices} onRemove={fields.length > 1 ? () => remove(at) : undefined} />)}
          {fields.length < MOST_ITEMS ? <Button kind="quiet" icon={<Plus size={16} aria-hidden />} className="justify-self-start" onClick={() => append(itemFor(undefined))}>One more thing</Button> : null}
          <DateField label="Until" error={errors.dueOn?.message} {...form.register('dueOn')} />
          <FormError message={form.rootError} />
          <Button type="submit" kind="primary" pending={isSubmitting}>Set it</Button>
        </form>
      </Dialog>
    </>
  );
}
