import type { Attendance } from '@/lib/calendar/attendance';
import type { LocalDate } from '@/lib/time';
import type { AppAbility } from '@/policies/ability';
import { allowedRows } from '@/policies/where';
import type { Db } from './connection';
import { LIVE_STATES } from './occurrences';

export type RegisterRow = {
  seatId: string; studentId: string; studentName: string; attendance: Attendance; rowVersion: number; localDate: LocalDate; startMin: number; lengthMinutes: number;
  teacherName: string | null; lessonTypeLabel: string; roomName: string | null;
};

/** Lessons of past days that still wait for a mark, the oldest first, as far as this person may mark them. */
export const unmarkedRegister = (db: Db, ability: AppAbility, span: { from: LocalDate; before: LocalDate }): Promise<RegisterRow[]> =>
  db('seat as s').join('occurrence as o', 'o.id', 's.occurrenceId').join('lesson_type as t', 't.id', 'o.lessonTypeId').join('person as x', 'x.id', 's.studentId')
    .leftJoin('person as p', 'p.id', 'o.plannedTeacherId').leftJoin('room as r', 'r.id', 'o.roomId')
    .where('s.attendance', 'expected').where('o.localDate', '>=', span.from).where('o.localDate', '<', span.before).whereIn('o.state', LIVE_STATES).where('t.isTaught', 1)
    .where(allowedRows(ability, 'update', 'Attendance', 'o'))
    .select<RegisterRow[]>('s.id as seatId', 's.studentId', 's.attendance', 's.rowVersion', 'o.localDate', 'o.startMin', 'o.lengthMinutes', 't.label as lessonTypeLabel', 'r.name as roomName',
      db.raw("trim(coalesce(x.called_name, x.given_name) || ' ' || x.family_name) AS student_name"), db.raw("trim(p.given_name || ' ' || p.family_name) AS teacher_name"))
    .orderBy('o.startsAt').limit(200);
