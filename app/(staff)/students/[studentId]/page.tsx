import { notFound } from 'next/navigation';
import { ButtonLink } from '@/components/ui/button';
import { PageHeader } from '@/components/ui/page-header';
import { plural } from '@/lib/format';
import { practiceForStaff } from '@/lib/ladder/server/practice-for-staff';
import { studentStanding } from '@/lib/ladder/server/student-standing';
import { readStudent } from '@/lib/people/server/read-students';
import { requireContextTo } from '@/lib/server/context';
import { may } from '@/policies/ability';
import { OfficeView } from './_components/office-view';
import { TeacherView } from './_components/teacher-view';

export const metadata = { title: 'Student' };

/** The teacher finds the ladder and the next lesson first; desk and owner lessons, contacts and credits. */
export default async function StudentPage({ params }: { params: Promise<{ studentId: string }> }) {
  const context = await requireContextTo('read', 'Student');
  const student = await readStudent({ id: (await params).studentId }, context);
  if (!student?.isStudent) notFound();
  const standing = await studentStanding(student.id, context);
  const practice = await practiceForStaff(student.id, context);
  const canEnrol = may(context.ability, 'create', 'Enrolment');
  const canHear = may(context.ability, 'create', 'Hearing', { studentId: student.id, assessorId: context.actor.personId });
  const view = { student, standing, practice, locale: context.school.locale, today: context.today };
  const about = [student.age === null ? null : plural(student.age, 'year'), standing?.level ? `level ${standing.level.no}, ${standing.level.title}` : null].filter(Boolean).join(', ');
  return (
    <>
      <PageHeader title={student.name} sub={about ? `${about.charAt(0).toUpperCase()}${about.slice(1)}.` : undefined}
        actions={<>{canEnrol ? <ButtonLink href={`/enrol?student=${student.id}`}>Enrol</ButtonLink> : null}{canHear ? <ButtonLink kind="brass" href={`/hearings/${student.id}`}>Hear a rung</ButtonLink> : null}</>} />
      {context.actor.role === 'teacher' ? <TeacherView {...view} /> : <OfficeView {...view} />}
    </>
  );
}
