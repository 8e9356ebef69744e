'use client';

import { useRouter } from 'next/navigation';
import { Button } from '@/components/ui/button';
import { INPUT } from '@/components/ui/field';
import { useActionForm } from '@/components/ui/use-action-form';
import { buildRunSchema } from '@/lib/payroll/schema';
import type { LocalDate } from '@/lib/time';
import { build } from '../actions';

/** Builds the pay of a month, or works it out again. */
export function BuildRun({ today }: { today: LocalDate }) {
  const router = useRouter();
  const form = useActionForm({
    schema: buildRunSchema, send: build, defaultValues: { month: today.slice(0, 7) },
    onDone: ({ payRunIds }) => (payRunIds.length === 1 ? router.push(`/payroll/${payRunIds[0]}`) : router.refresh()),
  });
  const error = form.formState.errors.month?.message ?? form.rootError;
  return (
    <form onSubmit={form.submit} noValidate className="flex flex-wrap items-center gap-2">
      <label className="text-small font-semibold" htmlFor="pay-month">Month</label>
      <input id="pay-month" type="month" max={today.slice(0, 7)} aria-invalid={error ? true : undefined} aria-describedby={error ? 'pay-month-error' : undefined} className={`${INPUT} max-w-44`} {...form.register('month')} />
      <Button type="submit" kind="primary" pending={form.formState.isSubmitting}>Build the pay</Button>
      {error ? <p id="pay-month-error" role="alert" className="w-full text-small font-semibold text-brick">{error}</p> : null}
    </form>
  );
}
