import type { Attendance } from '@/lib/calendar/attendance';
import type { EpochSeconds, LocalDate, Span } from '@/lib/time';
import type { AppAbility } from '@/policies/ability';
import { allowedRows } from '@/policies/where';
import type { Db, Trx } from './connection';
import type { LessonTypeCode } from './lesson-types';

export type OccurrenceState = 'planned' | 'needs_cover' | 'confirmed' | 'taught' | 'not_taught' | 'cancelled' | 'moved' | 'closed_by_school';
export const LIVE_STATES: OccurrenceState[] = ['planned', 'needs_cover', 'confirmed', 'taught', 'not_taught'];

export type Occurrence = Span & {
  id: string; seriesId: string | null; lessonTypeId: string; lessonTypeCode: LessonTypeCode; lessonTypeLabel: string; subjectId: string | null;
  title: string; localDate: LocalDate; startMin: number; lengthMinutes: number; zone: string; siteId: string; siteName: string;
  roomId: string | null; roomName: string | null; plannedTeacherId: string | null; taughtById: string | null; teacherName: string | null; teacherColour: string | null;
  coverName: string | null;
  mode: 'in_room' | 'online'; state: OccurrenceState; cancelDeadlineAt: EpochSeconds | null; lockedByPayRunId: string | null; rowVersion: number;
  notePublic: string;
};

export type NewOccurrence = Span & Pick<Occurrence, 'id' | 'seriesId' | 'lessonTypeId' | 'subjectId' | 'title' | 'localDate' | 'startMin' |
  'lengthMinutes' | 'zone' | 'siteId' | 'roomId' | 'plannedTeacherId' | 'mode' | 'cancelDeadlineAt'> & { createdBy?: string | null };

export async function insertOccurrence(trx: Trx, occurrence: NewOccurrence): Promise<void> {
  await trx('occurrence').insert(occurrence);
}

function joined(db: Db) {
  return db('occurrence as o').join('lesson_type as t', 't.id', 'o.lessonTypeId').join('site as w', 'w.id', 'o.siteId')
    .leftJoin('room as r', 'r.id', 'o.roomId').leftJoin('person as p', 'p.id', 'o.plannedTeacherId').leftJoin('person as c', 'c.id', 'o.taughtById')
    .select<Occurrence[]>('o.*', 't.code as lessonTypeCode', 't.label as lessonTypeLabel', 'w.name as siteName', 'r.name as roomName',
      db.raw("trim(p.given_name || ' ' || p.family_name) AS teacher_name"), db.raw("trim(c.given_name || ' ' || c.family_name) AS cover_name"),
      db.raw('(SELECT e.colour FROM engagement e WHERE e.person_id = o.planned_teacher_id ORDER BY e.starts_on DESC LIMIT 1) AS teacher_colour'));
}

export const findOccurrence = (db: Db, id: string): Promise<Occurrence | undefined> => joined(db).where('o.id', id).first();

const touching = (db: Db, span: Span) => joined(db).where('o.startsAt', '<', span.endsAt).where('o.startsAt', '>', span.startsAt - 86_400)
  .where('o.endsAt', '>', span.startsAt).whereIn('o.state', LIVE_STATES).orderBy('o.startsAt');

/** For a screen: only the bookings this person may read leave the database. */
export const occurrencesFor = (db: Db, ability: AppAbility, span: Span): Promise<Occurrence[]> =>
  touching(db, span).where(allowedRows(ability, 'read', 'Occurrence', 'o'));

export async function setOccurrenceState(trx: Trx, id: string, state: OccurrenceState): Promise<void> {
  await trx('occurrence').where({ id }).update({ state, rowVersion: trx.raw('row_version + 1') });
}

export type SeatRow = {
  id: string; occurrenceId: string; studentId: string; studentName: string; enrolmentId: string | null; source: string; attendance: Attendance;
  arrivedAt: EpochSeconds | null; toldAt: EpochSeconds | null; minutesLate: number | null; rowVersion: number; bornOn: LocalDate | null;
};

export const seatsOf = (db: Db, occurrenceIds: readonly string[]): Promise<SeatRow[]> =>
  db('seat as s').join('person as p', 'p.id', 's.studentId').whereIn('s.occurrenceId', [...occurrenceIds])
    .select<SeatRow[]>('s.id', 's.occurrenceId', 's.studentId', 's.enrolmentId', 's.source', 's.attendance', 's.arrivedAt', 's.toldAt', 's.minutesLate',
      's.rowVersion', 'p.bornOn', db.raw("trim(coalesce(p.called_name, p.given_name) || ' ' || p.family_name) AS student_name"))
    .orderBy(['p.givenName', 'p.familyName']);

export type NewSeat = { id: string; occurrenceId: string; studentId: string; enrolmentId: string | null; source: 'roster' | 'make_up' | 'drop_in' | 'trial' | 'visitor' };
export async function insertSeats(trx: Trx, seats: NewSeat[]): Promise<void> {
  for (let at = 0; at < seats.length; at += 100) await trx('seat').insert(seats.slice(at, at + 100));
}

export type BusyTime = Span & { id: string; startMin: number; lengthMinutes: number };
/** That somebody or some room is taken, without by whom or for what. */
export const busyTimes = (db: Db, span: Span, of: { teacherId: string | null; roomId: string | null }): Promise<BusyTime[]> =>
  db('occurrence as o').where('o.startsAt', '<', span.endsAt).where('o.startsAt', '>', span.startsAt - 86_400).where('o.endsAt', '>', span.startsAt).whereIn('o.state', LIVE_STATES)
    .modify((query) => {
      if (of.teacherId) query.whereRaw('coalesce(o.taught_by_id, o.planned_teacher_id) = ?', [of.teacherId]);
      if (of.roomId) query.where('o.roomId', of.roomId);
    })
    .select<BusyTime[]>('o.id', 'o.startsAt', 'o.endsAt', 'o.startMin', 'o.lengthMinutes');
