import { payerBills } from '@/lib/tuition/server/payer-bills';
import { progressOfStudent, type StudentProgress } from '@/lib/ladder/server/progress-of-student';
import { familyLessons } from '@/lib/calendar/server/family-lessons';
import { requireContextTo } from '@/lib/server/context';
import { addDays } from '@/lib/time';
import { may } from '@/policies/ability';
import { NextLesson } from './_components/next-lesson';
import { ProgressCard } from './_components/progress-card';
import { ToPay } from './_components/to-pay';

export const metadata = { title: 'Home' };

export default async function HomePage() {
  const context = await requireContextTo('read', 'Seat');
  const { actor, today, now, school } = context;
  const { lessons, students } = await familyLessons({ from: today, until: addDays(today, 60) }, context);
  const bills = actor.payerIds.length > 0 ? await payerBills(context) : null;
  const progress: StudentProgress[] = [];
  for (const { id } of students) {
    const one = await progressOfStudent(id, context);
    if (one) progress.push(one);
  }
  const coming = students.map(({ id }) => lessons.find((lesson) => lesson.studentId === id && lesson.startsAt + lesson.lengthMinutes * 60 > now && lesson.attendance === 'expected')).filter((lesson) => lesson !== undefined);
  return (
    <div className="flex flex-col gap-4 pt-5">
      <h1 className="sr-only">Home</h1>
      {coming.length === 0 ? <p className="text-ink-3">No lesson is planned in the next weeks.</p> : null}
      {coming.sort((a, b) => a.startsAt - b.startsAt).map((lesson) => (
        <NextLesson key={lesson.seatId} lesson={lesson} today={today} locale={school.locale} canReport={may(context.ability, 'update', 'Seat', { studentId: lesson.studentId })} isReader={lesson.studentId === actor.personId} now={now} />
      ))}
      {bills ? <ToPay bills={bills} locale={school.locale} today={today} /> : null}
      {progress.map((one) => <ProgressCard key={one.ladder.student.id} progress={one} />)}
    </div>
  );
}
