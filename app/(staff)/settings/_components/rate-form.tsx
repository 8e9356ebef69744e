'use client';

import { useWatch } from 'react-hook-form';
import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import { DateField, MoneyField, SelectField, TextField } from '@/components/ui/inputs';
import { Sheet } from '@/components/ui/sheet';
import { useActionForm } from '@/components/ui/use-action-form';
import { beginRateSchema, RATED_WORK } from '@/lib/payroll/rate-schema';
import { isTaughtWork, WORK_OF_LESSON, WORK_WORDS } from '@/lib/payroll/rates';
import type { RateBook } from '@/lib/payroll/server/pay-rates';
import type { LocalDate } from '@/lib/time';
import { saveRate } from '../actions';
import { signOf } from './currency-sign';

const numberOrNothing = { setValueAs: (typed: string | number | null) => (typed === null || typed === '' ? null : Number(typed)) };
const WORKS = RATED_WORK.map((value) => ({ value, label: WORK_WORDS[value] }));
const PER = [{ value: 'lesson', label: 'a lesson' }, { value: 'hour', label: 'an hour' }];

type RateFormProps = { book: RateBook; locale: string; today: LocalDate };

const useRateForm = ({ book, today }: RateFormProps) => useActionForm({
  schema: beginRateSchema, send: saveRate, onDone: () => void toast.success('The rate is set.'),
  defaultValues: { engagementId: book.teachers[0]?.engagementId ?? '', workType: 'lesson', lessonTypeId: '', lengthMinutes: null, seatsFrom: null, seatsTo: null, per: 'lesson', amount: '', validFrom: today },
});
type Form = ReturnType<typeof useRateForm>;

/** A new rate from a day on; the one before ends that day and stays to be read. */
export function RateForm(props: RateFormProps) {
  const { book, locale } = props;
  const form = useRateForm(props);
  const { errors, isSubmitting } = form.formState;
  const [workType, engagementId] = useWatch({ control: form.control, name: ['workType', 'engagementId'] });
  const currency = book.teachers.find((teacher) => teacher.engagementId === engagementId)?.currency ?? 'EUR';
  const onWork = () => {
    form.setValue('lessonTypeId', '');
    if (!isTaughtWork(form.getValues('workType'))) form.setValue('per', 'hour');
  };
  return (
    <Sheet title="Set a rate">
      <form onSubmit={form.submit} noValidate className="flex flex-col gap-4">
        <SelectField label="Teacher" options={book.teachers.map((teacher) => ({ value: teacher.engagementId, label: nameOf(teacher, book) }))} error={errors.engagementId?.message} {...form.register('engagementId')} />
        <SelectField label="For" options={WORKS} error={errors.workType?.message} {...form.register('workType', { onChange: onWork })} />
        {isTaughtWork(workType) ? <LessonFields form={form} types={book.lessonTypes.filter(({ code }) => WORK_OF_LESSON[code] === workType)} /> : <p className="text-small text-ink-3">Paid by the hour.</p>}
        {workType === 'group' ? <SeatFields form={form} /> : null}
        <MoneyField label="Rate" currencySign={signOf({ locale, currency })} error={errors.amount?.message} {...form.register('amount')} />
        <DateField label="From" error={errors.validFrom?.message} {...form.register('validFrom')} />
        <FormError message={form.rootError} />
        <Button type="submit" kind="primary" pending={isSubmitting}>Set the rate</Button>
      </form>
    </Sheet>
  );
}

function LessonFields({ form, types }: { form: Form; types: RateBook['lessonTypes'] }) {
  const { errors } = form.formState;
  return (
    <>
      <SelectField label="Lesson type" options={[{ value: '', label: 'Any' }, ...types.map(({ id, label }) => ({ value: id, label }))]} error={errors.lessonTypeId?.message} {...form.register('lessonTypeId')} />
      <TextField label="Minutes" optional inputMode="numeric" help="Empty: whatever the length." error={errors.lengthMinutes?.message} {...form.register('lengthMinutes', numberOrNothing)} />
      <SelectField label="Paid by" options={PER} error={errors.per?.message} {...form.register('per')} />
    </>
  );
}

function SeatFields({ form }: { form: Form }) {
  const { errors } = form.formState;
  return (
    <div className="grid grid-cols-2 gap-4">
      <TextField label="Seats from" optional inputMode="numeric" error={errors.seatsFrom?.message} {...form.register('seatsFrom', numberOrNothing)} />
      <TextField label="Seats to" optional inputMode="numeric" error={errors.seatsTo?.message} {...form.register('seatsTo', numberOrNothing)} />
    </div>
  );
}

/** Who works for two legal entities is told apart by them. */
function nameOf({ name, personId, legalEntityName }: RateBook['teachers'][number], { teachers }: RateBook): string {
  return teachers.filter((teacher) => teacher.personId === personId).length > 1 ? `${name}, ${legalEntityName}` : name;
}
