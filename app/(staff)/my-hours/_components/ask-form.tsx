'use client';

import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import { DateField, TextArea } from '@/components/ui/inputs';
import { useActionForm } from '@/components/ui/use-action-form';
import { askSchema } from '@/lib/payroll/schema';
import type { LineView, TeacherPay } from '@/lib/payroll/server/teacher-pay';
import { ask } from '../actions';

/** A question to the office, about a line or about a day on which something is missing. */
export function AskForm({ pay, line, onClose }: { pay: TeacherPay; line: LineView | null; onClose: () => void }) {
  const form = useActionForm({
    schema: askSchema, send: ask, onDone: onClose,
    defaultValues: { payRunId: pay.payRunId, engagementId: pay.engagementId, lineId: line?.lineId ?? null, aboutOn: line?.localDate ?? pay.startsOn, text: '' },
  });
  const { errors, isSubmitting } = form.formState;
  return (
    <form onSubmit={form.submit} noValidate className="flex flex-col gap-3">
      {line === null ? <DateField label="On which day" min={pay.startsOn} max={pay.endsOn} error={errors.aboutOn?.message} {...form.register('aboutOn')} /> : null}
      <TextArea label={line === null ? 'What is missing' : 'What would you like to know'} rows={2} error={errors.text?.message} {...form.register('text')} />
      <FormError message={form.rootError} />
      <div className="flex gap-3"><Button type="submit" kind="primary" pending={isSubmitting}>Send the question</Button><Button onClick={onClose}>Leave it</Button></div>
    </form>
  );
}
