import { PageHeader } from '@/components/ui/page-header';
import { readRegister } from '@/lib/calendar/server/read-register';
import { plural } from '@/lib/format';
import { requireContextTo } from '@/lib/server/context';
import { RegisterList } from './_components/register-list';

export const metadata = { title: 'Register' };

export default async function RegisterPage() {
  const context = await requireContextTo('update', 'Attendance');
  const rows = await readRegister(context);
  return (
    <>
      <PageHeader title="Register" sub={rows.length === 0 ? 'Every past lesson is marked.' : `${plural(rows.length, 'mark')} missing. Unmarked lessons hold up pay and are never taken as present.`} />
      <RegisterList rows={rows} locale={context.school.locale} showsTeacher={context.actor.role !== 'teacher' || context.actor.isLead} />
    </>
  );
}
