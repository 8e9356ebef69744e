import { Find } from '@/components/shell/find';
import { PageHeader } from '@/components/ui/page-header';
import { calendarChoices } from '@/lib/calendar/server/calendar-week';
import { requireContextTo } from '@/lib/server/context';
import { CalendarLoader } from './_components/calendar-loader';

export const metadata = { title: 'Calendar' };

export default async function CalendarPage({ searchParams }: { searchParams: Promise<{ teacher?: string; room?: string; date?: string }> }) {
  const context = await requireContextTo('read', 'Occurrence');
  const { teacher, room, date } = await searchParams;
  const choices = await calendarChoices(context);
  const { actor, school, today } = context;
  const ownFirst = actor.role === 'teacher' ? actor.personId : (choices.teachers[0]?.value ?? null);
  return (
    <>
      <PageHeader title="Calendar" sub={`Times are those of the school, ${school.zone.split('/').at(-1)?.replaceAll('_', ' ')}.`} actions={<Find />} />
      <CalendarLoader choices={choices} first={{ teacherId: room ? null : (teacher ?? ownFirst), roomId: room ?? null }} date={date ?? today} today={today} zone={school.zone} locale={school.locale} weekStart={school.weekStart} />
    </>
  );
}
