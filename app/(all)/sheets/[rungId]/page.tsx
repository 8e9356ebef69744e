import { Download } from 'lucide-react';
import { buttonClass } from '@/components/ui/button';
import { PageHeader } from '@/components/ui/page-header';
import { PrintButton } from '@/components/ui/print-button';
import { practiceSheet, type PracticeSheet } from '@/lib/ladder/server/practice-sheet';
import { requireContextTo } from '@/lib/server/context';
import { orNotFound } from '@/lib/server/or-not-found';
import { KeyChoice } from './_components/key-choice';
import { SheetRows } from './_components/sheet-rows';

export const metadata = { title: 'Practice sheet' };

type Props = { params: Promise<{ rungId: string }>; searchParams: Promise<{ keys?: string | string[] }> };

export default async function SheetPage({ params, searchParams }: Props) {
  const context = await requireContextTo('read', 'Ladder');
  const keys = [(await searchParams).keys ?? []].flat();
  const sheet = await orNotFound(practiceSheet({ rungId: (await params).rungId, keys }, context));
  const { rung, rows, schoolName } = sheet;
  return (
    <>
      <PageHeader title={rung.plainTitle} sub={`${rung.code} ${rung.title}. ${tempoWords(sheet)}`} actions={<><PrintButton label="Print or save as PDF" />{rung.isPlayed ? <Files sheet={sheet} /> : null}</>} />
      <div className="grid gap-4">
        <p className="max-w-[70ch]">{`To ${rung.canDo}. ${rung.soundsLike}`} <span className="text-ink-2">{rung.criteria.listenFor}</span></p>
        <KeyChoice rungId={rung.id} pool={rung.keyPool} chosen={sheet.keys} />
        <SheetRows rows={rows} />
        <p className="text-small text-ink-3">{`${schoolName}. Play slowly first, rest often, and stop when something hurts: re-spread a voicing instead of stretching for it.`}</p>
      </div>
    </>
  );
}

function tempoWords({ rung: { criteria: { tempo, seconds } } }: PracticeSheet): string {
  if (tempo) return `${tempo.beatsPerMinute} beats a minute, ${tempo.beatsPerChord} to a chord.`;
  return seconds ? `${seconds} seconds to find each.` : '';
}

function Files({ sheet: { rung, keys } }: { sheet: PracticeSheet }) {
  const query = new URLSearchParams({ keys: keys.join(',') }).toString();
  return (['musicxml', 'midi'] as const).map((kind) => (
    <a key={kind} href={`/api/sheets/${rung.id}?${query}&as=${kind}`} download className={buttonClass('quiet')}><Download size={16} aria-hidden />{kind === 'midi' ? 'MIDI' : 'MusicXML'}</a>
  ));
}
