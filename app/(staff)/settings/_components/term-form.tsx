'use client';

import { useWatch } from 'react-hook-form';
import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import { DateField, TextField } from '@/components/ui/inputs';
import { Sheet } from '@/components/ui/sheet';
import { useActionForm } from '@/components/ui/use-action-form';
import type { TermPlanFacts } from '@/lib/calendar/server/read-terms';
import { addTermSchema } from '@/lib/calendar/term-schema';
import { saveTerm } from '../actions';
import { WeekdayCounts } from './weekday-counts';

const EMPTY = { name: '', startsOn: '', endsOn: '' };

/** The counts stand there while the days are typed: a term of uneven weekdays is seen before it is saved. */
export function TermForm({ plan }: { plan: TermPlanFacts }) {
  const form = useActionForm({ schema: addTermSchema, defaultValues: EMPTY, send: saveTerm, onDone: () => { toast.success('The term is added.'); form.reset(EMPTY); } });
  const { errors, isSubmitting } = form.formState;
  const [startsOn = '', endsOn = ''] = useWatch({ control: form.control, name: ['startsOn', 'endsOn'] });
  const isTerm = addTermSchema.safeParse({ name: 'term', startsOn, endsOn }).success;
  return (
    <Sheet title="Add a term">
      <form onSubmit={form.submit} noValidate className="flex flex-col gap-4">
        <TextField label="Name" help="Autumn, Spring. The school year follows from the first day." error={errors.name?.message} {...form.register('name')} />
        <DateField label="First day" error={errors.startsOn?.message} {...form.register('startsOn')} />
        <DateField label="Last day" error={errors.endsOn?.message} {...form.register('endsOn')} />
        <div role="status">
          {isTerm ? <><p className="eyebrow mb-1">Lessons on each weekday</p><WeekdayCounts term={{ startsOn, endsOn }} closures={plan.closures} sites={plan.sites} /></> : null}
        </div>
        <FormError message={form.rootError} />
        <Button type="submit" kind="primary" pending={isSubmitting}>Add the term</Button>
      </form>
    </Sheet>
  );
}
