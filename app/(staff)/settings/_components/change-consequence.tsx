'use client';

import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { FormError } from '@/components/ui/form-error';
import { Checkbox, DateField, SelectField, TextField } from '@/components/ui/inputs';
import { useActionForm } from '@/components/ui/use-action-form';
import { ATTENDANCE_WORDS, type MarkedAttendance } from '@/lib/calendar/attendance';
import { consequenceFormSchema } from '@/lib/calendar/consequence-schema';
import { CREDIT_WORDS } from '@/lib/calendar/consequence-words';
import { consequencesOn, type DatedConsequences } from '@/lib/calendar/consequences';
import { addDays, type LocalDate } from '@/lib/time';
import { saveConsequence } from '../actions';

type ChangeConsequenceProps = { mark: MarkedAttendance; versions: readonly DatedConsequences[]; today: LocalDate; onClose: () => void };

const CREDITS = Object.entries(CREDIT_WORDS).map(([value, label]) => ({ value, label }));
/** One mark means something else from a day on; every other mark stays as it is. */
export function ChangeConsequence({ mark, versions, today, onClose }: ChangeConsequenceProps) {
  const now = consequencesOn(versions, today)[mark];
  const form = useActionForm({
    schema: consequenceFormSchema, send: saveConsequence, onDone: () => { toast.success('The rule is changed.'); onClose(); },
    defaultValues: { mark, charged: now.charged, credit: now.credit, employee: String(now.payBp.employee / 100), contractor: String(now.payBp.contractor / 100), drawsPackage: now.drawsPackage, validFrom: addDays(today, 1) },
  });
  const { errors, isSubmitting } = form.formState;
  return (
    <Dialog open onOpenChange={(open) => { if (!open) onClose(); }} title={`“${ATTENDANCE_WORDS[mark]}”`} description="Lessons before the first day keep what the mark meant then, in credit, tuition and pay.">
      <form onSubmit={form.submit} noValidate className="flex flex-col gap-4">
        <Checkbox label="Charged to the family" help="Where tuition is charged lesson by lesson." {...form.register('charged')} />
        <SelectField label="Make-up credit" options={CREDITS} error={errors.credit?.message} {...form.register('credit')} />
        <div className="grid gap-4 sm:grid-cols-2">
          <TextField label="Pay of an employee, per cent" inputMode="decimal" error={errors.employee?.message} {...form.register('employee')} />
          <TextField label="Pay of a contractor, per cent" inputMode="decimal" error={errors.contractor?.message} {...form.register('contractor')} />
        </div>
        <Checkbox label="Draws one lesson from a package" {...form.register('drawsPackage')} />
        <DateField label="From" error={errors.validFrom?.message} {...form.register('validFrom')} />
        <FormError message={form.rootError} />
        <Button type="submit" kind="primary" pending={isSubmitting}>Change the rule</Button>
      </form>
    </Dialog>
  );
}
