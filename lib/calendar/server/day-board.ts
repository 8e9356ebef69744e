import 'server-only';
import { LIVE_STATES, occurrencesFor, seatsOf, type Occurrence, type SeatRow } from '@/db/occurrences';
import { liveRooms, openingSpans } from '@/db/rooms';
import { closuresBetween } from '@/db/terms';
import type { Context } from '@/lib/server/context';
import { addDays, instantOf, weekdayOf, type LocalDate } from '@/lib/time';
import { assertCan } from '@/policies/ability';

export type BoardSeat = Pick<SeatRow, 'id' | 'studentId' | 'studentName' | 'attendance' | 'rowVersion' | 'source'> & { hasArrived: boolean };
export type BoardLesson = Pick<Occurrence, 'id' | 'title' | 'startMin' | 'lengthMinutes' | 'startsAt' | 'endsAt' | 'roomId' | 'roomName' | 'siteName' |
  'plannedTeacherId' | 'taughtById' | 'teacherName' | 'teacherColour' | 'coverName' | 'lessonTypeCode' | 'lessonTypeLabel' | 'state' | 'mode'> & { seats: BoardSeat[] };
export type BoardRoom = { id: string; name: string; description: string; siteId: string; siteName: string };
export type DayBoard = {
  date: LocalDate; rooms: BoardRoom[]; lessons: BoardLesson[]; openFromMin: number; openToMin: number; closure: string | null;
};

/** The day by rooms: who is where, who has come in, who is late. */
export async function dayBoard({ date }: { date: LocalDate }, context: Context): Promise<DayBoard> {
  assertCan(context.ability, 'read', 'Room', {});
  const { db, school } = context;
  const span = { startsAt: instantOf(date, 0, school.zone), endsAt: instantOf(addDays(date, 1), 0, school.zone) };
  const lessons = await boardLessons(context, span);
  const open = (await openingSpans(db)).filter(({ weekday }) => weekday === weekdayOf(date));
  const closures = await closuresBetween(db, date, date);
  const starts = [...open.map(({ fromMin }) => fromMin), ...lessons.map(({ startMin }) => startMin)];
  const ends = [...open.map(({ toMin }) => toMin), ...lessons.map(({ startMin, lengthMinutes }) => startMin + lengthMinutes)];
  return {
    date, lessons, closure: closures.find(({ fromMin }) => fromMin === null)?.reason ?? null,
    rooms: (await liveRooms(db)).map(({ id, name, description, siteId, siteName }) => ({ id, name, description, siteId, siteName })),
    openFromMin: Math.min(...(starts.length > 0 ? starts : [540])), openToMin: Math.max(...(ends.length > 0 ? ends : [1260])),
  };
}

/** Lessons in a span with their seats, as far as this person may see them. */
export async function boardLessons({ db, ability }: Pick<Context, 'db' | 'ability'>, span: { startsAt: number; endsAt: number }): Promise<BoardLesson[]> {
  const occurrences = (await occurrencesFor(db, ability, span)).filter(({ state }) => LIVE_STATES.includes(state));
  const seats = new Map<string, BoardSeat[]>();
  for (const seat of await seatsOf(db, occurrences.map(({ id }) => id))) {
    seats.set(seat.occurrenceId, [...(seats.get(seat.occurrenceId) ?? []), boardSeat(seat)]);
  }
  return occurrences.map((occurrence) => boardLesson(occurrence, seats.get(occurrence.id) ?? []));
}

const boardSeat = ({ id, studentId, studentName, attendance, rowVersion, arrivedAt, source }: SeatRow): BoardSeat =>
  ({ id, studentId, studentName, attendance, rowVersion, source, hasArrived: arrivedAt !== null });

const boardLesson = (o: Occurrence, seats: BoardSeat[]): BoardLesson => ({
  id: o.id, title: o.title, startMin: o.startMin, lengthMinutes: o.lengthMinutes, startsAt: o.startsAt, endsAt: o.endsAt, roomId: o.roomId, roomName: o.roomName,
  siteName: o.siteName, plannedTeacherId: o.plannedTeacherId, taughtById: o.taughtById, teacherName: o.teacherName, teacherColour: o.teacherColour, coverName: o.coverName,
  lessonTypeCode: o.lessonTypeCode, lessonTypeLabel: o.lessonTypeLabel, state: o.state, mode: o.mode, seats,
});
