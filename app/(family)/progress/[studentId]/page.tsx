import { LadderBars } from '@/components/ladder/ladder-bars';
import { StudentLadder } from '@/components/ladder/student-ladder';
import { PageHeader } from '@/components/ui/page-header';
import { Sheet } from '@/components/ui/sheet';
import { EmptyState } from '@/components/ui/states';
import { progressOfStudent } from '@/lib/ladder/server/progress-of-student';
import { levelsAround } from '@/lib/ladder/student-ladder';
import { requireContextTo } from '@/lib/server/context';
import { orNotFound } from '@/lib/server/or-not-found';
import { HearingsInWords } from './_components/hearings-in-words';
import { InWords } from './_components/in-words';

export const metadata = { title: 'Progress' };

const LEVELS_IN_PICTURE = 4;

export default async function ProgressPage({ params }: { params: Promise<{ studentId: string }> }) {
  const context = await requireContextTo('read', 'Progress');
  const progress = await orNotFound(progressOfStudent((await params).studentId, context));
  if (!progress) return <><PageHeader title="Progress" /><EmptyState title="The ladder is not set up yet">The school is preparing it; come back soon.</EmptyState></>;
  const { ladder, words, hearings, isReader } = progress;
  const { locale } = context.school;
  return (
    <>
      <PageHeader title={isReader ? 'My ladder' : `${ladder.student.firstName} on the ladder`} sub={words.count} />
      <div className="grid gap-4">
        <Sheet>
          <LadderBars levels={levelsAround(ladder, LEVELS_IN_PICTURE)} />
          <InWords words={words} />
        </Sheet>
        <HearingsInWords hearings={hearings} locale={locale} isReader={isReader} />
        <Sheet title="Every rung"><StudentLadder ladder={ladder} locale={locale} isPlain /></Sheet>
      </div>
    </>
  );
}
