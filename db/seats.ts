import type { Attendance, MarkedAttendance } from '@/lib/calendar/attendance';
import type { EpochSeconds, LocalDate } from '@/lib/time';
import type { Db, Trx } from './connection';

export type SeatWithLesson = {
  id: string; occurrenceId: string; studentId: string; studentName: string; enrolmentId: string | null; source: string; attendance: Attendance; rowVersion: number;
  localDate: LocalDate; startMin: number; lengthMinutes: number; startsAt: EpochSeconds; endsAt: EpochSeconds; cancelDeadlineAt: EpochSeconds | null;
  plannedTeacherId: string | null; taughtById: string | null; lockedByPayRunId: string | null; occurrenceState: string; bornOn: LocalDate | null;
};

export const findSeat = (db: Db, id: string): Promise<SeatWithLesson | undefined> =>
  db('seat as s').join('occurrence as o', 'o.id', 's.occurrenceId').join('person as p', 'p.id', 's.studentId').where('s.id', id)
    .select<SeatWithLesson[]>('s.id', 's.occurrenceId', 's.studentId', 's.enrolmentId', 's.source', 's.attendance', 's.rowVersion', 'o.localDate', 'o.startMin', 'o.lengthMinutes',
      'o.startsAt', 'o.endsAt', 'o.cancelDeadlineAt', 'o.plannedTeacherId', 'o.taughtById', 'o.lockedByPayRunId', 'o.state as occurrenceState', 'p.bornOn',
      db.raw("trim(coalesce(p.called_name, p.given_name) || ' ' || p.family_name) AS student_name"))
    .first();

export type Mark = {
  attendance: MarkedAttendance; minutesLate: number | null; markedById: string; markedAt: EpochSeconds;
  toldAt: EpochSeconds | null; toldById: string | null; toldVia: string | null;
};

/** Marks a seat if nobody else did meanwhile; answers whether it was this one. */
export async function markSeat(trx: Trx, id: string, rowVersion: number, mark: Mark): Promise<boolean> {
  return (await trx('seat').where({ id, rowVersion }).update({ ...mark, rowVersion: rowVersion + 1 })) === 1;
}

export async function marksOfOccurrence(db: Db, occurrenceId: string): Promise<Attendance[]> {
  const rows: { attendance: Attendance }[] = await db('seat').where({ occurrenceId }).select('attendance');
  return rows.map((row) => row.attendance);
}

export async function setArrived(trx: Trx, id: string, arrivedAt: EpochSeconds | null): Promise<void> {
  await trx('seat').where({ id }).update({ arrivedAt });
}
