import { notFound } from 'next/navigation';
import { ButtonLink } from '@/components/ui/button';
import { PageHeader } from '@/components/ui/page-header';
import { may } from '@/policies/ability';
import { addDays } from '@/lib/time';
import { readStudent } from '@/lib/people/server/read-students';
import { studentStanding } from '@/lib/ladder/server/student-standing';
import { requireContextTo } from '@/lib/server/context';
import { PracticePanel } from './_components/practice-panel';
import { StudentFacts } from './_components/student-facts';
import { StudentLessons } from './_components/student-lessons';
import { StudentProgress } from './_components/student-progress';

export const metadata = { title: 'Student' };

export default async function StudentPage({ params }: { params: Promise<{ studentId: string }> }) {
  const context = await requireContextTo('read', 'Student');
  const student = await readStudent({ id: (await params).studentId }, context);
  if (!student) notFound();
  const standing = await studentStanding(student.id, context);
  const { locale } = context.school;
  const nextLessonOn = student.lessons.find(({ localDate }) => localDate > context.today)?.localDate ?? addDays(context.today, 7);
  return (
    <>
      <PageHeader title={student.name} sub={student.age === null ? undefined : `${student.age} years.`}
        actions={<>{may(context.ability, 'create', 'Enrolment') ? <ButtonLink href={`/enrol?student=${student.id}`}>Enrol</ButtonLink> : null}{standing?.mayHear ? <ButtonLink kind="brass" href={`/hearings/${student.id}`}>Hear a rung</ButtonLink> : null}</>} />
      <div className="grid items-start gap-4 lg:grid-cols-[minmax(0,1fr)_320px]">
        <div className="grid min-w-0 gap-4">
          {standing ? <StudentProgress standing={standing} locale={locale} /> : null}
          <StudentLessons lessons={student.lessons} locale={locale} today={context.today} />
        </div>
        <div className="grid min-w-0 gap-4">
          {standing ? <PracticePanel standing={standing} nextLessonOn={nextLessonOn} locale={locale} /> : null}
          <StudentFacts student={student} locale={locale} />
        </div>
      </div>
    </>
  );
}
