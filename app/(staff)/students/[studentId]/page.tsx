import { notFound } from 'next/navigation';
import { ButtonLink } from '@/components/ui/button';
import { PageHeader } from '@/components/ui/page-header';
import { may } from '@/policies/ability';
import { readStudent } from '@/lib/people/server/read-students';
import { requireContextTo } from '@/lib/server/context';
import { StudentFacts } from './_components/student-facts';
import { StudentLessons } from './_components/student-lessons';

export const metadata = { title: 'Student' };

export default async function StudentPage({ params }: { params: Promise<{ studentId: string }> }) {
  const context = await requireContextTo('read', 'Student');
  const student = await readStudent({ id: (await params).studentId }, context);
  if (!student) notFound();
  const canHear = may(context.ability, 'create', 'Hearing', { studentId: student.id, assessorId: context.actor.personId });
  return (
    <>
      <PageHeader title={student.name} sub={student.age === null ? undefined : `${student.age} years.`}
        actions={<>{may(context.ability, 'create', 'Enrolment') ? <ButtonLink href={`/enrol?student=${student.id}`}>Enrol</ButtonLink> : null}{canHear ? <ButtonLink kind="brass" href={`/hearings/${student.id}`}>Hear a rung</ButtonLink> : null}</>} />
      <div className="grid items-start gap-4 lg:grid-cols-[minmax(0,1fr)_320px]">
        <StudentLessons lessons={student.lessons} locale={context.school.locale} today={context.today} />
        <StudentFacts student={student} locale={context.school.locale} />
      </div>
    </>
  );
}
