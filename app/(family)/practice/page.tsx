import { PageHeader } from '@/components/ui/page-header';
import { EmptyState } from '@/components/ui/states';
import { plural } from '@/lib/format';
import { practiceToday } from '@/lib/ladder/server/practice-today';
import { requireContextTo } from '@/lib/server/context';
import { orNotFound } from '@/lib/server/or-not-found';
import { AddMinutes } from './_components/add-minutes';
import { HandsCare } from './_components/hands-care';
import { MinutesPicture } from './_components/minutes-picture';
import { PieceList } from './_components/piece-list';

export const metadata = { title: 'Practice' };

export default async function PracticePage() {
  const context = await requireContextTo('create', 'Practice');
  const today = await orNotFound(practiceToday({ studentId: context.actor.personId }, context));
  if (!today) return <><PageHeader title="Practice" /><EmptyState title="The ladder is not set up yet">The school is preparing it; come back soon.</EmptyState></>;
  const { locale } = context.school;
  return (
    <>
      <PageHeader title="Practice" sub={today.minutesToday === 0 ? 'Nothing yet today. A few minutes are worth more than none.' : `${plural(today.minutesToday, 'minute')} today.`} />
      <div className="grid gap-4">
        <PieceList today={today} locale={locale} />
        <MinutesPicture days={today.days} locale={locale} />
        <AddMinutes studentId={today.student.id} pieces={today.pieces} />
        <HandsCare />
      </div>
    </>
  );
}
