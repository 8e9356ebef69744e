'use client';

import { useEffect, useState, useTransition } from 'react';
import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import { Checkbox, DateField, SelectField } from '@/components/ui/inputs';
import { Sheet } from '@/components/ui/sheet';
import { WishGrid } from '@/components/ui/wish-grid';
import type { Enquiry } from '@/db/enquiries';
import type { OpeningSearchInput } from '@/lib/calendar/schema';
import type { FoundOpenings } from '@/lib/calendar/server/find-openings-for';
import type { SearchFacts } from '@/lib/calendar/server/read-enquiries';
import { addDays } from '@/lib/time';
import { searchOpenings } from '../actions';
import { OpeningResults } from './opening-results';

type OpeningFinderProps = { facts: SearchFacts; enquiry: Enquiry | null; isWeekly: boolean; locale: string };

const LENGTHS = [30, 45, 60].map((minutes) => ({ value: String(minutes), label: `${minutes} minutes` }));
const LEVELS = Array.from({ length: 10 }, (_, index) => ({ value: String(index + 1), label: `Level ${index + 1}` }));

function firstSearch({ facts, enquiry, isWeekly }: OpeningFinderProps): OpeningSearchInput {
  return {
    subjectId: enquiry?.subjectId ?? facts.subjects[0]?.id ?? '', level: enquiry?.levelGuess ?? 1, lengthMinutes: enquiry?.lengthMinutes ?? 30, isWeekly, fromDate: facts.fromDate,
    untilDate: isWeekly ? facts.termEndsOn : addDays(facts.fromDate, 13), windows: enquiry?.wishes ?? [], siteId: enquiry?.siteId ?? null, features: [],
  };
}

/** With an enquiry the search runs by itself: the desk reads the answer out while the caller is on the line. */
export function OpeningFinder(props: OpeningFinderProps) {
  const { facts, enquiry, locale } = props;
  const [search, setSearch] = useState(() => firstSearch(props));
  const [found, setFound] = useState<FoundOpenings | null>(null);
  const [message, setMessage] = useState<string>();
  const [pending, startTransition] = useTransition();
  const run = (wanted: OpeningSearchInput) => startTransition(async () => {
    const result = await searchOpenings(wanted).catch(() => null);
    setMessage(result?.ok ? undefined : (Object.values(result?.fields ?? {})[0]?.[0] ?? result?.message ?? 'This did not reach the school. Press again.'));
    setFound(result?.ok ? result.data : null);
  });
  useEffect(() => {
    if (enquiry) run(firstSearch(props));
    // Once, on arrival; afterwards the person presses the button.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [enquiry?.id]);
  const change = (part: Partial<OpeningSearchInput>) => setSearch((before) => ({ ...before, ...part }));
  return (
    <div className="grid items-start gap-5 lg:grid-cols-[380px_minmax(0,1fr)]">
      <Sheet>
        <form onSubmit={(event) => { event.preventDefault(); run(search); }} className="flex flex-col gap-4" aria-label="Search for openings">
          <WishGrid value={search.windows} onChange={(windows) => change({ windows })} />
          <div className="grid grid-cols-2 gap-3">
            <SelectField label="Length" options={LENGTHS} value={search.lengthMinutes} onChange={(event) => change({ lengthMinutes: Number(event.target.value) })} />
            <SelectField label="Level" options={LEVELS} value={search.level} onChange={(event) => change({ level: Number(event.target.value) })} />
            <DateField label="From" value={search.fromDate} onChange={(event) => change({ fromDate: event.target.value })} />
            <DateField label="Until" value={search.untilDate} onChange={(event) => change({ untilDate: event.target.value })} />
          </div>
          <SelectField label="Site" placeholder="Any site" options={facts.sites.map(({ id, name }) => ({ value: id, label: name }))} value={search.siteId ?? ''} onChange={(event) => change({ siteId: event.target.value || null })} />
          <SelectField label="The room needs" placeholder="Nothing special" options={facts.features.map(({ code, label }) => ({ value: code, label }))} value={search.features?.[0] ?? ''} onChange={(event) => change({ features: event.target.value ? [event.target.value] : [] })} />
          <Checkbox label="Every week until the last day" checked={search.isWeekly ?? false} onChange={(event) => change({ isWeekly: event.target.checked, untilDate: event.target.checked ? facts.termEndsOn : addDays(search.fromDate, 13) })} />
          <FormError message={message} />
          <Button type="submit" kind="primary" pending={pending}>Find openings</Button>
        </form>
      </Sheet>
      <OpeningResults found={found} pending={pending} enquiry={enquiry} subjectId={search.subjectId} isWeekly={search.isWeekly ?? false} locale={locale} onTaken={() => run(search)} />
    </div>
  );
}
