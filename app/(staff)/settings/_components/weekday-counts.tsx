import { weekdayCounts, weekdayHint, type Closure, type Term } from '@/lib/calendar/term';
import type { TermSite } from '@/lib/calendar/server/read-terms';
import { WEEKDAYS } from '@/lib/calendar/weekday-words';

type WeekdayCountsProps = { term: Term; closures: readonly Closure[]; sites: readonly TermSite[] };

/** How many lessons each weekday has: "Mon 13, Tue 12". Sites that count alike share a line. */
export function WeekdayCounts({ term, closures, sites }: WeekdayCountsProps) {
  const lines = new Map<string, { names: string[]; counts: ReturnType<typeof weekdayCounts> }>();
  for (const site of sites) {
    const counts = weekdayCounts(term, closures, site);
    const key = JSON.stringify(counts);
    const known = lines.get(key);
    if (known) known.names.push(site.name);
    else lines.set(key, { names: [site.name], counts });
  }
  return (
    <div className="flex flex-col gap-3">
      {[...lines.values()].map(({ names, counts }) => (
        <div key={names.join()}>
          {lines.size > 1 ? <p className="mb-1 text-small text-ink-3">{names.join(', ')}</p> : null}
          <dl className="grid max-w-[400px] auto-cols-fr grid-flow-col gap-1" aria-label={`Lessons on each weekday${lines.size > 1 ? `, ${names.join(', ')}` : ''}`}>
            {counts.map(({ weekday, lessons }) => (
              <div key={weekday} className="flex flex-col items-center rounded border border-rule py-1">
                <dt className="text-small text-ink-3"><abbr title={WEEKDAYS[weekday - 1]} className="no-underline">{WEEKDAYS[weekday - 1]?.slice(0, 3)}</abbr></dt>
                <dd className="num font-semibold">{lessons}</dd>
              </div>
            ))}
          </dl>
          <p className="mt-1 text-small text-ink-3">{weekdayHint(counts)}</p>
        </div>
      ))}
    </div>
  );
}
