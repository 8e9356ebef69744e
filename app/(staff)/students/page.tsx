import { Find } from '@/components/shell/find';
import { PageHeader } from '@/components/ui/page-header';
import { plural } from '@/lib/format';
import { readStudents } from '@/lib/people/server/read-students';
import { requireContextTo } from '@/lib/server/context';
import { may } from '@/policies/ability';
import { StudentTable } from './_components/student-table';

export const metadata = { title: 'Students' };

export default async function StudentsPage() {
  const context = await requireContextTo('read', 'Student');
  const rows = await readStudents(context);
  const isTeacher = context.actor.role === 'teacher';
  return (
    <>
      <PageHeader title={isTeacher && !context.actor.isLead ? 'My students' : 'Students'} sub={`${plural(rows.length, 'student')}.`} actions={<Find />} />
      <StudentTable rows={rows} today={context.today} showsFamily={!isTeacher} mayExport={may(context.ability, 'export', 'Student')} />
    </>
  );
}
