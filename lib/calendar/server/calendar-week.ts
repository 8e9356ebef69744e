import 'server-only';
import type * as z from 'zod';
import { fullName } from '@/db/people';
import { liveRooms } from '@/db/rooms';
import { busyTimes, occurrencesFor } from '@/db/occurrences';
import { liveTeachers } from '@/db/teachers';
import { closuresBetween } from '@/db/terms';
import { AppError } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import { addDays, localDateOf, type LocalDate } from '@/lib/time';
import { may } from '@/policies/ability';
import type { calendarQuerySchema } from '../schema';
import { boardLessons } from './day-board';

export type CalendarEntry = {
  id: string; title: string; detail: string; localDate: LocalDate; startMin: number; lengthMinutes: number; colour: string; kind: 'lesson' | 'event' | 'busy' | 'closure'; roomName: string; state: string;
};
type Query = z.output<typeof calendarQuerySchema>;

const LONGEST_SPAN_SECONDS = 45 * 86_400;

/** What stands in the calendar between two instants for one teacher, one room, or everybody, as far as this person may see it. */
export async function calendarEntries({ from, until, teacherId, roomId }: Query, context: Context): Promise<CalendarEntry[]> {
  if (until <= from || until - from > LONGEST_SPAN_SECONDS) throw new AppError('invalid', 'Ask for at most six weeks at once.');
  const isWanted = (lesson: { plannedTeacherId: string | null; taughtById: string | null; roomId: string | null }) =>
    (!teacherId || (lesson.taughtById ?? lesson.plannedTeacherId) === teacherId) && (!roomId || lesson.roomId === roomId);
  const lessons = (await boardLessons(context, { startsAt: from, endsAt: until })).filter(isWanted);
  return [...lessons.map((lesson) => entryOf(lesson, context.school.zone)), ...(await othersBusy({ from, until, teacherId, roomId }, context)), ...(await closureEntries({ from, until }, context))];
}

function entryOf(lesson: Awaited<ReturnType<typeof boardLessons>>[number], zone: string): CalendarEntry {
  const names = lesson.seats.map(({ studentName }) => studentName);
  const title = lesson.title || (names.length === 1 ? (names[0] ?? '') : names.length > 1 ? `${lesson.lessonTypeLabel}, ${names.length}` : lesson.lessonTypeLabel);
  return {
    id: lesson.id, title: lesson.lessonTypeCode === 'trial' ? `Trial: ${title}` : title, detail: lesson.coverName ?? lesson.teacherName ?? '', localDate: localDateOf(lesson.startsAt, zone),
    startMin: lesson.startMin, lengthMinutes: lesson.lengthMinutes, colour: lesson.plannedTeacherId ? (lesson.teacherColour ?? 'petrol') : 'plum', kind: lesson.seats.length > 0 ? 'lesson' : 'event',
    roomName: lesson.roomName ?? 'online', state: lesson.state,
  };
}

/** A teacher sees that a colleague or a room is taken, and nothing of by whom. */
async function othersBusy({ from, until, teacherId, roomId }: Query, { db, ability, actor, school }: Context): Promise<CalendarEntry[]> {
  if (may(ability, 'manage', 'Occurrence') || actor.isLead || !may(ability, 'read', 'BusyTime') || (!teacherId && !roomId)) return [];
  const mine = new Set((await occurrencesFor(db, ability, { startsAt: from, endsAt: until })).map(({ id }) => id));
  const rows = await busyTimes(db, { startsAt: from, endsAt: until }, { teacherId: teacherId ?? null, roomId: roomId ?? null });
  return rows.filter(({ id }) => !mine.has(id)).map(({ id, startsAt, startMin, lengthMinutes }) => ({
    id: `busy-${id}`, title: 'taken', detail: '', localDate: localDateOf(startsAt, school.zone), startMin, lengthMinutes, colour: 'wash', kind: 'busy', roomName: '', state: 'planned',
  }));
}

async function closureEntries({ from, until }: Pick<Query, 'from' | 'until'>, { db, school }: Context): Promise<CalendarEntry[]> {
  const closures = await closuresBetween(db, localDateOf(from, school.zone), addDays(localDateOf(until, school.zone), 0));
  return closures.map(({ closedOn, reason, fromMin, toMin }) => ({
    id: `closed-${closedOn}`, title: reason, detail: 'no teaching', localDate: closedOn, startMin: fromMin ?? 0, lengthMinutes: fromMin !== null && toMin !== null ? toMin - fromMin : 1440, colour: 'brass', kind: 'closure', roomName: '', state: 'planned',
  }));
}

export type CalendarChoices = { teachers: { value: string; label: string }[]; rooms: { value: string; label: string }[] };

export async function calendarChoices({ db, ability, today }: Pick<Context, 'db' | 'ability' | 'today'>): Promise<CalendarChoices> {
  if (!may(ability, 'read', 'Room')) return { teachers: [], rooms: [] };
  return {
    teachers: (await liveTeachers(db, today)).map((teacher) => ({ value: teacher.id, label: fullName(teacher) })),
    rooms: (await liveRooms(db)).map(({ id, name, siteName }) => ({ value: id, label: `${name}, ${siteName}` })),
  };
}
