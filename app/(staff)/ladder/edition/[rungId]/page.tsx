import { notFound } from 'next/navigation';
import { ButtonLink } from '@/components/ui/button';
import { PageHeader } from '@/components/ui/page-header';
import { draftScreen } from '@/lib/ladder/server/edition-draft';
import { requireContextTo } from '@/lib/server/context';
import { LeaveOut } from './_components/leave-out';
import { RungForm } from './_components/rung-form';

export const metadata = { title: 'Rung of the next edition' };

export default async function DraftRungPage({ params }: { params: Promise<{ rungId: string }> }) {
  const context = await requireContextTo('update', 'Ladder');
  const { rungId } = await params;
  const draft = await draftScreen(context);
  const rungs = draft?.levels.flatMap((level) => level.rungs) ?? [];
  const rung = rungs.find(({ id }) => id === rungId);
  if (!draft || !rung) notFound();
  const others = rungs.filter(({ id }) => id !== rungId).map(({ id, code, title }) => ({ id, label: `${code} ${title}` }));
  return (
    <>
      <PageHeader title={`${rung.code} ${rung.title}`} sub={`${draft.label}, in preparation.`} actions={<><ButtonLink href="/ladder/edition" kind="quiet">All rungs</ButtonLink><LeaveOut rungId={rung.id} code={rung.code} others={others} /></>} />
      <RungForm rung={rung} others={others} chordStyle={draft.chordStyle} />
    </>
  );
}
