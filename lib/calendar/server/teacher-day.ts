import 'server-only';
import { unmarkedByTeacher } from '@/db/desk';
import type { Context } from '@/lib/server/context';
import { addDays, instantOf, type LocalDate } from '@/lib/time';
import { boardLessons, type BoardLesson } from './day-board';

export type TeacherLesson = BoardLesson & { unmarked: boolean };
export type TeacherDay = { date: LocalDate; lessons: TeacherLesson[]; unmarkedBefore: number };

const CHASED_DAYS = 42;

/** The teacher's own day, lessons taken over from a colleague included, and how many earlier lessons still wait for a mark. */
export async function teacherDay({ date }: { date: LocalDate }, context: Context): Promise<TeacherDay> {
  const { db, actor, school, today } = context;
  const span = { startsAt: instantOf(date, 0, school.zone), endsAt: instantOf(addDays(date, 1), 0, school.zone) };
  const mine = (await boardLessons(context, span)).filter(({ plannedTeacherId, taughtById }) => (taughtById ?? plannedTeacherId) === actor.personId);
  const lessons = mine.map((lesson): TeacherLesson => ({ ...lesson, unmarked: lesson.seats.some(({ attendance }) => attendance === 'expected') }));
  const waiting = (await unmarkedByTeacher(db, today, addDays(today, -CHASED_DAYS))).find(({ teacherId }) => teacherId === actor.personId);
  return { date, lessons, unmarkedBefore: waiting?.lessons ?? 0 };
}
