import { ButtonLink } from '@/components/ui/button';
import { PageHeader } from '@/components/ui/page-header';
import { EmptyState } from '@/components/ui/states';
import { plural } from '@/lib/format';
import { schoolLadder } from '@/lib/ladder/server/school-ladder';
import { requireContextTo } from '@/lib/server/context';
import { may } from '@/policies/ability';
import { InstallButton } from './_components/install-button';
import { LevelSheet } from './_components/level-sheet';

export const metadata = { title: 'Ladder' };

export default async function LadderPage() {
  const context = await requireContextTo('read', 'Ladder');
  const ladder = await schoolLadder(context);
  if (!ladder) {
    const mayInstall = may(context.ability, 'create', 'Ladder');
    return (
      <>
        <PageHeader title="Ladder" />
        <EmptyState title="The school has no ladder yet" action={mayInstall ? <InstallButton /> : undefined}>
          {mayInstall ? 'Install the first edition: ten levels of chord voicings from first chords to a whole blues. Your next edition can change every word of it.' : 'The owner installs one; then every student’s way up is seen here.'}
        </EmptyState>
      </>
    );
  }
  const rungCount = ladder.levels.reduce((sum, { rungs }) => sum + rungs.length, 0);
  return (
    <>
      <PageHeader title="Ladder" sub={`${ladder.label}: ${plural(ladder.levels.length, 'level')}, ${plural(rungCount, 'rung')}. ${plural(ladder.climbers, 'student')} on it. The figures carry no names.`} actions={may(context.ability, 'update', 'Ladder') ? <ButtonLink href="/ladder/edition">Next edition</ButtonLink> : undefined} />
      <div className="grid gap-3">
        {ladder.levels.map((level, at) => <LevelSheet key={level.no} level={level} climbers={ladder.climbers} isOpen={at === 0} />)}
      </div>
    </>
  );
}
