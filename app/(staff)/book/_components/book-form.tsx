'use client';

import { useRouter } from 'next/navigation';
import { useWatch } from 'react-hook-form';
import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import { DateField, SelectField, TextField, TimeField, type SelectOption } from '@/components/ui/inputs';
import { useActionForm } from '@/components/ui/use-action-form';
import { bookSchema, type BookInput } from '@/lib/calendar/schema';
import type { CalendarChoices } from '@/lib/calendar/server/calendar-week';
import { book } from '../actions';

type BookFormProps = { choices: CalendarChoices; students: readonly SelectOption[]; first: Pick<BookInput, 'teacherId' | 'roomId' | 'localDate' | 'start' | 'lengthMinutes'> };

const KINDS = [
  { value: 'single', label: 'Lesson' }, { value: 'make_up', label: 'Make-up lesson' }, { value: 'rehearsal', label: 'Rehearsal' }, { value: 'rental', label: 'Rental' },
  { value: 'tuning', label: 'Tuning' }, { value: 'meeting', label: 'Meeting' },
];
const orNull = (text: string | null) => text || null;

export function BookForm({ choices, students, first }: BookFormProps) {
  const router = useRouter();
  const form = useActionForm({
    schema: bookSchema, defaultValues: { lessonTypeCode: 'single', title: '', studentId: null, ...first }, send: book,
    onDone: ({ notes }) => {
      toast.success(['Booked.', ...notes].join(' '));
      router.push(`/today?date=${form.getValues('localDate')}`);
    },
  });
  const { errors, isSubmitting } = form.formState;
  const kind = useWatch({ control: form.control, name: 'lessonTypeCode' });
  const isLesson = kind === 'single' || kind === 'make_up';
  return (
    <form onSubmit={form.submit} noValidate className="sheet flex flex-col gap-4 p-4" aria-label="Book">
      <SelectField label="What" options={KINDS} error={errors.lessonTypeCode?.message} {...form.register('lessonTypeCode')} />
      {isLesson ? <SelectField label="Student" placeholder="Choose a student" options={students} error={errors.studentId?.message} {...form.register('studentId', { setValueAs: orNull })} />
        : <TextField label="Title" help="As it should stand on the board." error={errors.title?.message} {...form.register('title')} />}
      <SelectField label="Teacher" optional={!isLesson} placeholder={isLesson ? 'Choose a teacher' : 'Nobody'} options={choices.teachers} error={errors.teacherId?.message} {...form.register('teacherId', { setValueAs: orNull })} />
      <SelectField label="Room" placeholder="Choose a room" options={choices.rooms} error={errors.roomId?.message} {...form.register('roomId')} />
      <div className="grid grid-cols-2 gap-3 sm:grid-cols-3">
        <DateField label="Date" error={errors.localDate?.message} {...form.register('localDate')} />
        <TimeField label="Start" error={errors.start?.message} {...form.register('start')} />
        <TextField label="Minutes" inputMode="numeric" error={errors.lengthMinutes?.message} {...form.register('lengthMinutes', { valueAsNumber: true })} />
      </div>
      <FormError message={form.rootError} />
      <Button type="submit" kind="primary" pending={isSubmitting}>Book</Button>
    </form>
  );
}
