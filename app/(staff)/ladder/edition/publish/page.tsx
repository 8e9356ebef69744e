import { notFound } from 'next/navigation';
import { ButtonLink } from '@/components/ui/button';
import { PageHeader } from '@/components/ui/page-header';
import { plural } from '@/lib/format';
import { draftScreen } from '@/lib/ladder/server/edition-draft';
import { rehearseEdition } from '@/lib/ladder/server/publish-edition';
import { requireContextTo } from '@/lib/server/context';
import { DraftProblems } from '../_components/draft-problems';
import { PublishButton } from './_components/publish-button';
import { RehearsedStudents } from './_components/rehearsed-students';

export const metadata = { title: 'Rehearse the edition' };

export default async function PublishPage() {
  const context = await requireContextTo('update', 'Ladder');
  const draft = await draftScreen(context);
  if (!draft) notFound();
  const seen = await rehearseEdition(context);
  return (
    <>
      <PageHeader title={`${draft.label}, rehearsed`} sub={`${plural(seen.climbers, 'student')} on the ladder. Nothing has changed yet.`}
        actions={<><ButtonLink href="/ladder/edition" kind="quiet">Back to the draft</ButtonLink>{draft.problems.length === 0 ? <PublishButton label={draft.label} seen={{ climbers: seen.climbers, gaining: seen.gaining.length, heldUp: seen.heldUp.length, rechecks: seen.rechecks }} /> : null}</>} />
      <div className="grid gap-4">
        <DraftProblems problems={draft.problems} />
        <p>{`${plural(seen.unchanged, 'student stays', 'students stay')} as they are, ${plural(seen.gaining.length, 'gains', 'gain')} rungs, ${plural(seen.heldUp.length, 'meets', 'meet')} a new rung below where they are, ${plural(seen.rechecks, 'pass is', 'passes are')} heard once more. Nothing passed becomes unpassed.`}</p>
        <RehearsedStudents title="Who gains" students={seen.gaining} />
        <RehearsedStudents title="Who meets a new rung" students={seen.heldUp} />
      </div>
    </>
  );
}
