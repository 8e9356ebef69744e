'use client';

import { useWatch } from 'react-hook-form';
import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import { DateField, SelectField, TextField, TimeField } from '@/components/ui/inputs';
import { Sheet } from '@/components/ui/sheet';
import { useActionForm } from '@/components/ui/use-action-form';
import type { TermPlanFacts } from '@/lib/calendar/server/read-terms';
import { datesBetween } from '@/lib/calendar/term';
import { addClosureSchema } from '@/lib/calendar/term-schema';
import { plural } from '@/lib/format';
import type { LocalDate } from '@/lib/time';
import { saveClosure } from '../actions';
import { WeekdayCounts } from './weekday-counts';

type Typed = { from?: string; until?: string; siteId?: string; fromTime?: string; toTime?: string };

/** A planned closure: known before the lessons are. What it leaves of the term is shown while it is typed. */
export function ClosureForm({ plan, today }: { plan: TermPlanFacts; today: LocalDate }) {
  const empty = { from: today, until: today, siteId: '', reason: '', fromTime: '', toTime: '' };
  const form = useActionForm({ schema: addClosureSchema, defaultValues: empty, send: saveClosure, onDone: ({ days }) => { toast.success(`${plural(days, 'day is', 'days are')} closed.`); form.reset({ ...form.getValues(), reason: '', fromTime: '', toTime: '' }); } });
  const { errors, isSubmitting } = form.formState;
  const typed = useWatch({ control: form.control });
  const sites = [{ value: '', label: 'Every site' }, ...plan.sites.map(({ id, name }) => ({ value: id, label: name }))];
  return (
    <Sheet title="Add a closed day">
      <form onSubmit={form.submit} noValidate className="flex flex-col gap-4">
        <div className="grid gap-4 sm:grid-cols-2">
          <DateField label="First day" error={errors.from?.message} {...form.register('from', { onChange: (event: { target: { value: string } }) => { if (form.getValues('until') < event.target.value) form.setValue('until', event.target.value); } })} />
          <DateField label="Last day" error={errors.until?.message} {...form.register('until')} />
        </div>
        <TextField label="Reason" help="Families read it in their calendar." error={errors.reason?.message} {...form.register('reason')} />
        {plan.sites.length > 1 ? <SelectField label="Where" options={sites} error={errors.siteId?.message} {...form.register('siteId')} /> : null}
        <div className="grid gap-4 sm:grid-cols-2">
          <TimeField label="From" optional error={errors.fromTime?.message} {...form.register('fromTime')} />
          <TimeField label="To" optional error={errors.toTime?.message} {...form.register('toTime')} />
        </div>
        <div role="status"><LeftOfTerm plan={plan} typed={typed} /></div>
        <FormError message={form.rootError} />
        <Button type="submit" kind="primary" pending={isSubmitting}>Close</Button>
      </form>
    </Sheet>
  );
}

function LeftOfTerm({ plan, typed }: { plan: TermPlanFacts; typed: Typed }) {
  const closing = addClosureSchema.safeParse({ ...typed, reason: 'closing' });
  if (!closing.success) return null;
  const { from, until, siteId, fromTime } = closing.data;
  if (fromTime !== '') return <p className="text-small text-ink-3">A closure of some hours leaves the number of lessons as it is; no lesson is planned inside it.</p>;
  const added = datesBetween(from, until).map((closedOn) => ({ closedOn, siteId: siteId === '' ? null : siteId, fromMin: null, toMin: null }));
  const touched = plan.terms.filter((term) => term.startsOn <= until && from <= term.endsOn);
  if (touched.length === 0) return <p className="text-small text-ink-3">Outside every term: no count of lessons changes.</p>;
  return touched.map((term) => (
    <div key={term.id}>
      <p className="eyebrow mb-1">{term.name}: lessons left on each weekday</p>
      <WeekdayCounts term={term} closures={[...plan.closures, ...added]} sites={plan.sites} />
    </div>
  ));
}
