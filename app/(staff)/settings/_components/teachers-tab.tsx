'use client';

import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { Chip } from '@/components/ui/chip';
import { FormError } from '@/components/ui/form-error';
import { Checkbox, DateField } from '@/components/ui/inputs';
import { Sheet } from '@/components/ui/sheet';
import { EmptyState } from '@/components/ui/states';
import { useActionForm } from '@/components/ui/use-action-form';
import type { StaffPaper } from '@/db/staff-papers';
import { formatDate, plural } from '@/lib/format';
import { backgroundCheckSchema } from '@/lib/people/schema';
import { addDays, type LocalDate } from '@/lib/time';
import { saveCheck } from '../actions';

/** Whose papers are in order. Without a valid background check nobody is planned with a student under 18. */
export function TeachersTab({ papers, locale, today }: { papers: readonly StaffPaper[]; locale: string; today: LocalDate }) {
  const form = useActionForm({
    schema: backgroundCheckSchema, defaultValues: { personIds: [], issuedOn: today, expiresOn: addDays(today, 3 * 365) }, send: saveCheck,
    onDone: ({ count }) => { toast.success(`${plural(count, 'check')} recorded.`); form.reset({ ...form.getValues(), personIds: [] }); },
  });
  const { errors, isSubmitting } = form.formState;
  if (papers.length === 0) return <Sheet flush><EmptyState title="No teachers yet">Teachers come in with the importer.</EmptyState></Sheet>;
  return (
    <form onSubmit={form.submit} noValidate className="grid items-start gap-4 lg:grid-cols-[minmax(0,1fr)_320px]" aria-label="Background checks">
      <ul className="sheet">
        {papers.map((paper) => (
          <li key={paper.personId} className="flex flex-wrap items-center justify-between gap-3 border-b border-rule px-4 py-3 last:border-b-0">
            <Checkbox label={paper.name} value={paper.personId} {...form.register('personIds')} />
            <span className="flex flex-wrap items-center gap-3 text-small text-ink-3">
              {paper.highestLevel ? `to level ${paper.highestLevel}, ` : ''}{paper.kind}
              <CheckChip paper={paper} locale={locale} today={today} />
            </span>
          </li>
        ))}
      </ul>
      <Sheet title="Record a background check" className="flex flex-col gap-4">
        <p className="text-small text-ink-3">Tick the teachers whose check you have seen. What it must say, and how long it is good, is for your local law.</p>
        <DateField label="Issued on" error={errors.issuedOn?.message} {...form.register('issuedOn')} />
        <DateField label="Good until" error={errors.expiresOn?.message} {...form.register('expiresOn')} />
        <FormError message={errors.personIds?.message ?? errors.personIds?.root?.message ?? form.rootError} />
        <Button type="submit" kind="primary" pending={isSubmitting}>Record</Button>
      </Sheet>
    </form>
  );
}

function CheckChip({ paper: { checkExpiresOn, checkIssuedOn }, locale, today }: { paper: StaffPaper; locale: string; today: LocalDate }) {
  if (checkIssuedOn === null) return <Chip tone="bad">no background check</Chip>;
  if (checkExpiresOn !== null && checkExpiresOn < today) return <Chip tone="bad">check ran out {formatDate(checkExpiresOn, locale, 'full')}</Chip>;
  const isSoon = checkExpiresOn !== null && checkExpiresOn < addDays(today, 60);
  return <Chip tone={isSoon ? 'wait' : 'ok'}>check good{checkExpiresOn ? ` until ${formatDate(checkExpiresOn, locale, 'full')}` : ''}</Chip>;
}
