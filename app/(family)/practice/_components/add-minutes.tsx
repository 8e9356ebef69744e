'use client';

import { useRouter } from 'next/navigation';
import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import { SelectField, TextField } from '@/components/ui/inputs';
import { Sheet } from '@/components/ui/sheet';
import { useActionForm } from '@/components/ui/use-action-form';
import { plural } from '@/lib/format';
import { finishPracticeSchema } from '@/lib/ladder/schema';
import type { PracticePiece } from '@/lib/ladder/server/practice-today';
import { keepPractice } from '../actions';

const ELSE = 'else';

/** Minutes at the piano away from this page, as told. */
export function AddMinutes({ studentId, pieces }: { studentId: string; pieces: readonly PracticePiece[] }) {
  const router = useRouter();
  const set = pieces.filter(({ kind }) => kind === 'set');
  const form = useActionForm({
    schema: finishPracticeSchema,
    defaultValues: { studentId, kind: 'ahead', itemId: ELSE, minutes: undefined, how: 'told', note: '' },
    send: (input) => keepPractice({ ...input, kind: input.itemId === ELSE ? 'ahead' : 'set' }),
    onDone: ({ minutes }) => { toast.success(`${plural(minutes, 'minute')} noted.`); form.reset(); router.refresh(); },
  });
  const { errors, isSubmitting } = form.formState;
  return (
    <Sheet eyebrow="Played away from this page?">
      <form onSubmit={(event) => void form.submit(event)} className="grid items-start gap-3 sm:grid-cols-[120px_minmax(0,1fr)_auto]" noValidate>
        <TextField label="Minutes" inputMode="numeric" error={errors.minutes?.message} {...form.register('minutes', { setValueAs: (value: string) => (String(value ?? '').trim() === '' ? undefined : Number(value)) })} />
        <SelectField label="What" options={[...set.map(({ id, rung, text }) => ({ value: id, label: rung?.plainTitle ?? text })), { value: ELSE, label: 'Something else' }]} {...form.register('itemId')} />
        <Button type="submit" pending={isSubmitting} className="sm:mt-[26px]">Note it</Button>
      </form>
      <FormError message={form.rootError} />
    </Sheet>
  );
}
