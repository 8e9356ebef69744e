import { PageHeader } from '@/components/ui/page-header';
import { plural } from '@/lib/format';
import { findVoicings, voicingQuerySchema } from '@/lib/ladder/voicing-finder';
import { requireContextTo } from '@/lib/server/context';
import { FinderForm } from './_components/finder-form';
import { FoundPath } from './_components/found-path';

export const metadata = { title: 'Voicings' };

type Search = Promise<Record<string, string | string[] | undefined>>;

/** The smoothest way through any chords. Everything asked stands in the address: it can be kept, sent and opened again. */
export default async function VoicingsPage({ searchParams }: { searchParams: Search }) {
  const context = await requireContextTo('read', 'Ladder');
  const asked = await searchParams;
  const query = voicingQuerySchema.parse({ ...flat(asked), forms: [asked.forms ?? 'rootless_a,rootless_b'].flat().join(',') });
  const result = findVoicings(query, context.school.chordStyle);
  return (
    <>
      <PageHeader title="Voicings" sub={result.kind === 'found' ? `${plural(result.voicings.length, 'chord')}; the voices move ${plural(result.cost, 'half step')} in all, the least there is.` : 'The smoothest way through any chords.'} />
      <div className="grid items-start gap-4 lg:grid-cols-[300px_minmax(0,1fr)]">
        <FinderForm query={query} />
        {result.kind === 'found'
          ? <FoundPath voicings={result.voicings} tempo={query.tempo} fileQuery={new URLSearchParams({ ...asText(query) }).toString()} />
          : <p role="alert" className="rounded border border-brick bg-brick-wash px-3 py-2 text-brick">{result.message}</p>}
      </div>
    </>
  );
}

const flat = (asked: Record<string, string | string[] | undefined>): Record<string, string> =>
  Object.fromEntries(Object.entries(asked).flatMap(([name, value]) => (typeof value === 'string' ? [[name, value]] : [])));
const asText = ({ forms, ...rest }: ReturnType<typeof voicingQuerySchema.parse>): Record<string, string> =>
  ({ forms: forms.join(','), ...Object.fromEntries(Object.entries(rest).map(([name, value]) => [name, String(value)])) });
