import { deskToday } from '@/lib/calendar/server/desk-today';
import { teacherDay } from '@/lib/calendar/server/teacher-day';
import { formatDate } from '@/lib/format';
import { requireContextTo } from '@/lib/server/context';
import { isLocalDate } from '@/lib/time';
import { DeskTodayScreen } from './_components/desk-today-screen';
import { TeacherTodayScreen } from './_components/teacher-today-screen';

export const metadata = { title: 'Today' };

export default async function TodayPage({ searchParams }: { searchParams: Promise<{ date?: string }> }) {
  const context = await requireContextTo('read', 'Occurrence');
  const { date: asked } = await searchParams;
  const date = asked && isLocalDate(asked) ? asked : context.today;
  const { locale, zone } = context.school;
  const heading = { title: formatDate(date, locale, 'day'), date, isToday: date === context.today, zone };
  if (context.actor.role === 'teacher') return <TeacherTodayScreen day={await teacherDay({ date }, context)} heading={heading} now={context.now} />;
  return <DeskTodayScreen first={await deskToday({ date }, context)} heading={heading} />;
}
