import { Chip } from '@/components/ui/chip';
import { Sheet } from '@/components/ui/sheet';
import { EmptyState } from '@/components/ui/states';
import type { ClosureRow } from '@/db/closures';
import type { TermRow } from '@/db/terms';
import type { TermPlanFacts } from '@/lib/calendar/server/read-terms';
import { formatDate } from '@/lib/format';
import type { LocalDate } from '@/lib/time';
import { ClosedDays } from './closed-days';
import { ClosureForm } from './closure-form';
import { TermForm } from './term-form';
import { WeekdayCounts } from './weekday-counts';

type TermsTabProps = { plan: TermPlanFacts; locale: string; today: LocalDate };

/** Terms with their closed days, and what follows from both: how many lessons each weekday has. */
export function TermsTab({ plan, locale, today }: TermsTabProps) {
  const within = (term: TermRow) => plan.closures.filter(({ closedOn }) => term.startsOn <= closedOn && closedOn <= term.endsOn);
  const outside = plan.closures.filter(({ closedOn }) => closedOn >= today && !plan.terms.some((term) => term.startsOn <= closedOn && closedOn <= term.endsOn));
  const terms = [...plan.terms.filter(({ endsOn }) => endsOn >= today), ...plan.terms.filter(({ endsOn }) => endsOn < today).reverse()];
  return (
    <div className="grid items-start gap-4 lg:grid-cols-[minmax(0,1fr)_360px]">
      <div className="flex min-w-0 flex-col gap-4">
        {terms.length === 0 ? <Sheet flush><EmptyState title="No terms yet">Add the first one. Lessons, tuition and hearings are counted by term.</EmptyState></Sheet> : null}
        {terms.map((term) => <TermSheet key={term.id} term={term} closures={within(term)} sites={plan.sites} locale={locale} today={today} />)}
        {outside.length === 0 ? null : <Sheet title="Closed days outside the terms"><ClosedDays closures={outside} sites={plan.sites} locale={locale} /></Sheet>}
      </div>
      <div className="flex min-w-0 flex-col gap-4">
        <TermForm plan={plan} />
        <ClosureForm plan={plan} today={today} />
      </div>
    </div>
  );
}

type TermSheetProps = { term: TermRow; closures: readonly ClosureRow[]; sites: TermPlanFacts['sites']; locale: string; today: LocalDate };

function TermSheet({ term, closures, sites, locale, today }: TermSheetProps) {
  const state = stateWords(term, today);
  return (
    <Sheet title={`${term.name} ${term.yearLabel}`} eyebrow={`${formatDate(term.startsOn, locale, 'full')} to ${formatDate(term.endsOn, locale, 'full')}`}
      action={<Chip tone={state === 'running' ? 'ok' : state === 'to come' ? 'wait' : 'neutral'}>{state}</Chip>} className="flex flex-col gap-3">
      <WeekdayCounts term={term} closures={closures} sites={sites} />
      {closures.length === 0 ? <p className="text-small text-ink-3">No closed days.</p> : <ClosedDays closures={closures} sites={sites} locale={locale} />}
    </Sheet>
  );
}

const stateWords = ({ startsOn, endsOn, state }: TermRow, today: LocalDate): string => {
  if (state === 'closed') return 'closed';
  return today < startsOn ? 'to come' : endsOn < today ? 'ended' : 'running';
};
