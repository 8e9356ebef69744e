import { PageHeader } from '@/components/ui/page-header';
import { familyLessons } from '@/lib/calendar/server/family-lessons';
import { requireContextTo } from '@/lib/server/context';
import { addDays } from '@/lib/time';
import { may } from '@/policies/ability';
import { LessonList } from './_components/lesson-list';

export const metadata = { title: 'Lessons' };

export default async function LessonsPage() {
  const context = await requireContextTo('read', 'Seat');
  const { lessons, credits, students } = await familyLessons({ from: addDays(context.today, -28), until: addDays(context.today, 70) }, context);
  return (
    <>
      <PageHeader title="Lessons" sub="Tell us of an absence by the same hour on the day before." />
      <LessonList lessons={lessons} credits={credits} today={context.today} now={context.now} locale={context.school.locale} zone={context.school.zone} showsName={students.length > 1} canReport={may(context.ability, 'update', 'Seat', { studentId: students[0]?.id })} />
    </>
  );
}
