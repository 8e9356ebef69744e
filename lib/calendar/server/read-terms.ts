import 'server-only';
import { allClosures, type ClosureRow } from '@/db/closures';
import { allSites, openingSpans } from '@/db/rooms';
import { allTerms, type TermRow } from '@/db/terms';
import type { Context } from '@/lib/server/context';
import { assertCan } from '@/policies/ability';

/** A site and the weekdays on which it opens; one without opening hours yet may be taught at on any. */
export type TermSite = { id: string; name: string; weekdays: number[] };
export type TermPlanFacts = { terms: TermRow[]; closures: ClosureRow[]; sites: TermSite[] };

/** Terms, closed days and the weekdays of each site: what the number of lessons of a term follows from. */
export async function readTerms({ db, ability }: Context): Promise<TermPlanFacts> {
  assertCan(ability, 'read', 'Term', {});
  const spans = await openingSpans(db);
  const weekdaysOf = (siteId: string) => [...new Set(spans.filter((span) => span.siteId === siteId).map(({ weekday }) => weekday))];
  const sites = (await allSites(db)).map(({ id, name }) => ({ id, name, weekdays: weekdaysOf(id) }));
  return {
    terms: await allTerms(db), closures: await allClosures(db),
    sites: sites.map((site) => (site.weekdays.length === 0 ? { ...site, weekdays: [1, 2, 3, 4, 5, 6, 7] } : site)),
  };
}
