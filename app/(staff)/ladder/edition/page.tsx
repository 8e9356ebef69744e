import { ButtonLink } from '@/components/ui/button';
import { PageHeader } from '@/components/ui/page-header';
import { EmptyState } from '@/components/ui/states';
import { draftScreen } from '@/lib/ladder/server/edition-draft';
import { requireContextTo } from '@/lib/server/context';
import { AddRung } from './_components/add-rung';
import { BeginEdition } from './_components/begin-edition';
import { DraftLevels } from './_components/draft-levels';
import { DraftProblems } from './_components/draft-problems';

export const metadata = { title: 'Next edition' };

export default async function EditionPage() {
  const context = await requireContextTo('update', 'Ladder');
  const draft = await draftScreen(context);
  if (!draft) {
    return (
      <>
        <PageHeader title="Next edition" actions={<ButtonLink href="/ladder" kind="quiet">The live ladder</ButtonLink>} />
        <EmptyState title="No edition is being prepared" action={<BeginEdition />}>It begins as a copy of the live one. Nobody sees it until it is published, and nothing that was passed is lost by it.</EmptyState>
      </>
    );
  }
  const rungs = draft.levels.flatMap((level) => level.rungs);
  return (
    <>
      <PageHeader title={draft.label} sub={`In preparation. The ${draft.liveLabel.toLowerCase()} is live until this one is published.`}
        actions={<><ButtonLink href="/ladder" kind="quiet">The live ladder</ButtonLink><AddRung rungs={rungs.map(({ id, code, title, isNew }) => ({ id, label: `${code} ${title}`, isNew }))} /><ButtonLink href="/ladder/edition/publish" kind="primary">Rehearse and publish</ButtonLink></>} />
      <div className="grid gap-4">
        <DraftProblems problems={draft.problems} />
        <DraftLevels levels={draft.levels} leftOut={draft.leftOut} />
      </div>
    </>
  );
}
