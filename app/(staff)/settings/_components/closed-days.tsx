'use client';

import { useState, useTransition } from 'react';
import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import type { ClosureRow } from '@/db/closures';
import type { TermSite } from '@/lib/calendar/server/read-terms';
import { formatDate } from '@/lib/format';
import { clockOf } from '@/lib/time';
import { dropClosure } from '../actions';

type ClosedDaysProps = { closures: readonly ClosureRow[]; sites: readonly TermSite[]; locale: string };

/** Closed days, one a line. One that lessons were planned round stays, and says why. */
export function ClosedDays({ closures, sites, locale }: ClosedDaysProps) {
  const [refusal, setRefusal] = useState<{ id: string; message: string } | null>(null);
  const [pending, startTransition] = useTransition();
  const drop = ({ id, closedOn }: ClosureRow) => startTransition(async () => {
    const result = await dropClosure({ closureId: id }).catch(() => null);
    setRefusal(result?.ok ? null : { id, message: result?.message ?? 'This did not reach the school. Press again.' });
    if (result?.ok) toast.success(`${formatDate(closedOn, locale, 'day')} is a teaching day again.`);
  });
  return (
    <ul aria-label="Closed days" className="border-t border-rule">
      {closures.map((closure) => (
        <li key={closure.id} className="border-b border-rule py-2 last:border-b-0">
          <div className="flex flex-wrap items-center justify-between gap-x-3 gap-y-1">
            <p className="min-w-0 wrap-break-word"><b>{formatDate(closure.closedOn, locale, 'short')}</b>{hoursOf(closure)} · {closure.reason}{siteWords(closure, sites)}</p>
            <Button kind="quiet" disabled={pending} aria-label={`Take away the closed day ${formatDate(closure.closedOn, locale, 'day')}`} onClick={() => drop(closure)}>Take away</Button>
          </div>
          {refusal?.id === closure.id ? <FormError message={refusal.message} /> : null}
        </li>
      ))}
    </ul>
  );
}

const hoursOf = ({ fromMin, toMin }: ClosureRow) => (fromMin === null || toMin === null ? '' : `, ${clockOf(fromMin)}–${clockOf(toMin)}`);

function siteWords({ siteId }: ClosureRow, sites: readonly TermSite[]): string {
  if (sites.length < 2) return '';
  return ` · ${siteId === null ? 'every site' : (sites.find(({ id }) => id === siteId)?.name ?? 'one site')}`;
}
