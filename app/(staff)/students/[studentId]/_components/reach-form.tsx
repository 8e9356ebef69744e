'use client';

import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import { SelectField } from '@/components/ui/inputs';
import { useActionForm } from '@/components/ui/use-action-form';
import { LEAST_REACH, MOST_REACH, reachWords } from '@/lib/harmony/reach';
import { changeReachSchema } from '@/lib/people/schema';
import { saveReach } from '../actions';

const CHOICES = Array.from({ length: MOST_REACH - LEAST_REACH + 1 }, (_, at) => LEAST_REACH + at).map((semitones) => ({ value: String(semitones), label: reachWords(semitones) }));

export function ReachForm({ studentId, semitones }: { studentId: string; semitones: number }) {
  const form = useActionForm({
    schema: changeReachSchema, defaultValues: { studentId, reachSemitones: String(semitones) }, send: saveReach,
    onDone: ({ reachSemitones }) => { toast.success(`Noted: ${reachWords(reachSemitones)}.`); },
  });
  const { errors, isSubmitting, isDirty } = form.formState;
  return (
    <form onSubmit={form.submit} className="mt-3 grid gap-2">
      <SelectField label="Reach of one hand" options={CHOICES} error={errors.reachSemitones?.message} {...form.register('reachSemitones')} />
      <FormError message={form.rootError} />
      <Button type="submit" pending={isSubmitting} disabled={!isDirty} className="justify-self-start">Note the reach</Button>
    </form>
  );
}
