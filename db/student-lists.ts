import type { LocalDate } from '@/lib/time';
import type { AppAbility } from '@/policies/ability';
import { allowedRows } from '@/policies/where';
import type { Db } from './connection';

export type StudentListRow = {
  id: string; name: string; bornOn: LocalDate | null; teacherName: string | null; weekday: number | null; startMin: number | null; lengthMinutes: number | null;
  roomName: string | null; enrolments: number; familyId: string | null; familyName: string | null;
};

/** Students this person may read, with their first live enrolment. */
export const listStudents = (db: Db, ability: AppAbility): Promise<StudentListRow[]> =>
  db('person as p').where('p.isStudent', 1).where('p.state', 'live').where(allowedRows(ability, 'read', 'Student', 'p'))
    .leftJoin(db.raw(`(SELECT e.*, row_number() OVER (PARTITION BY e.student_id ORDER BY e.starts_on) AS place, count(*) OVER (PARTITION BY e.student_id) AS enrolments
       FROM enrolment e WHERE e.state IN ('active', 'paused', 'notice_given')) AS e ON e.student_id = p.id AND e.place = 1`))
    .leftJoin('series as s', 's.id', 'e.seriesId').leftJoin('room as r', 'r.id', 's.roomId').leftJoin('person as t', 't.id', 'e.teacherId')
    .leftJoin('family_student as fs', 'fs.studentId', 'p.id').leftJoin('family as f', 'f.id', 'fs.familyId')
    .select<StudentListRow[]>('p.id', 'p.bornOn', 's.weekday', 's.startMin', 'e.lengthMinutes', 'r.name as roomName', 'f.id as familyId', 'f.name as familyName',
      db.raw("trim(coalesce(p.called_name, p.given_name) || ' ' || p.family_name) AS name"), db.raw("trim(t.given_name || ' ' || t.family_name) AS teacher_name"), db.raw('coalesce(e.enrolments, 0) AS enrolments'))
    .groupBy('p.id').orderBy(['p.familyName', 'p.givenName']);

export type UpcomingLesson = { id: string; seatId: string; studentId: string; studentName: string; localDate: LocalDate; startMin: number; lengthMinutes: number; startsAt: number; roomName: string | null; siteName: string; teacherId: string | null; teacherName: string | null; lessonTypeLabel: string; attendance: string; cancelDeadlineAt: number | null; rowVersion: number };

/** Lessons of these students between two days, soonest first. */
export const lessonsOfStudents = (db: Db, studentIds: readonly string[], span: { from: LocalDate; until: LocalDate }): Promise<UpcomingLesson[]> =>
  db('seat as s').join('occurrence as o', 'o.id', 's.occurrenceId').join('lesson_type as t', 't.id', 'o.lessonTypeId').join('site as w', 'w.id', 'o.siteId').join('person as x', 'x.id', 's.studentId')
    .leftJoin('room as r', 'r.id', 'o.roomId').leftJoin('person as p', db.raw('p.id = coalesce(o.taught_by_id, o.planned_teacher_id)'))
    .whereIn('s.studentId', [...studentIds]).whereBetween('o.localDate', [span.from, span.until]).whereNotIn('o.state', ['cancelled', 'moved'])
    .select<UpcomingLesson[]>('o.id', 's.id as seatId', 's.studentId', 'o.localDate', 'o.startMin', 'o.lengthMinutes', 'o.startsAt', 'o.cancelDeadlineAt', 's.attendance', 's.rowVersion', 'r.name as roomName', 'w.name as siteName', 't.label as lessonTypeLabel', 'p.id as teacherId',
      db.raw("trim(p.given_name || ' ' || p.family_name) AS teacher_name"), db.raw("coalesce(x.called_name, x.given_name) AS student_name"))
    .orderBy('o.startsAt');

export type FamilyListRow = { id: string; name: string; payers: string | null; students: string | null; state: string };
export const listFamilies = (db: Db): Promise<FamilyListRow[]> =>
  db('family as f').select<FamilyListRow[]>('f.id', 'f.name', 'f.state',
    db.raw("(SELECT group_concat(trim(p.given_name || ' ' || p.family_name), ', ') FROM payer y JOIN person p ON p.id = y.person_id WHERE y.family_id = f.id) AS payers"),
    db.raw("(SELECT group_concat(coalesce(p.called_name, p.given_name), ', ') FROM family_student s JOIN person p ON p.id = s.student_id WHERE s.family_id = f.id) AS students"))
    .orderBy('f.name');

export type FamilyPerson = { personId: string; payerId: string; name: string; email: string | null; phone: string | null };
export const payersOfFamily = (db: Db, familyId: string): Promise<FamilyPerson[]> =>
  db('payer as y').leftJoin('person as p', 'p.id', 'y.personId').where('y.familyId', familyId).orderBy('y.orderNo')
    .select<FamilyPerson[]>('y.personId', 'y.id as payerId', db.raw("coalesce(trim(p.given_name || ' ' || p.family_name), y.organisation_name) AS name"),
      db.raw("(SELECT c.value FROM contact_point c WHERE c.person_id = p.id AND c.kind = 'email' ORDER BY c.is_primary DESC LIMIT 1) AS email"),
      db.raw("(SELECT c.value FROM contact_point c WHERE c.person_id = p.id AND c.kind = 'phone' LIMIT 1) AS phone"));

export const studentsOfFamily = (db: Db, familyId: string): Promise<{ id: string; name: string; bornOn: LocalDate | null }[]> =>
  db('family_student as s').join('person as p', 'p.id', 's.studentId').where('s.familyId', familyId)
    .select('p.id', 'p.bornOn', db.raw("trim(coalesce(p.called_name, p.given_name) || ' ' || p.family_name) AS name"));
