import { PageHeader } from '@/components/ui/page-header';
import { calendarChoices } from '@/lib/calendar/server/calendar-week';
import { readStudents } from '@/lib/people/server/read-students';
import { requireContextTo } from '@/lib/server/context';
import { clockOf, isLocalDate } from '@/lib/time';
import { BookForm } from './_components/book-form';

export const metadata = { title: 'Book' };
type Asked = { teacher?: string; room?: string; date?: string; start?: string; length?: string };

export default async function BookPage({ searchParams }: { searchParams: Promise<Asked> }) {
  const context = await requireContextTo('create', 'Occurrence');
  const asked = await searchParams;
  const students = (await readStudents(context)).map(({ id, name }) => ({ value: id, label: name }));
  const startMin = Number(asked.start);
  const first = {
    teacherId: asked.teacher ?? null, roomId: asked.room ?? '', localDate: asked.date && isLocalDate(asked.date) ? asked.date : context.today,
    start: asked.start && Number.isInteger(startMin) ? clockOf(startMin) : '', lengthMinutes: Number(asked.length) || 30,
  };
  return (
    <div className="max-w-[560px]">
      <PageHeader title="Book" sub="One lesson, rehearsal, rental or tuning. What is taken is refused, with a sentence that says who has it." />
      <BookForm choices={await calendarChoices(context)} students={students} first={first} />
    </div>
  );
}
