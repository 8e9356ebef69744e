import type { Attendance } from '@/lib/calendar/attendance';
import type { MileageFacts, TimeFacts, Worker } from '@/lib/payroll/pay-lines';
import type { WorkType } from '@/lib/payroll/rates';
import type { EpochSeconds, LocalDate } from '@/lib/time';
import type { Db, Trx } from './connection';

type Period = { from: LocalDate; to: LocalDate };
export type Engagement = Worker & { legalEntityId: string; startsOn: LocalDate; endsOn: LocalDate | null };

export const engagementsIn = (db: Db, { from, to }: Period): Promise<Engagement[]> =>
  db('engagement as e').join('person as p', 'p.id', 'e.personId').where('e.startsOn', '<=', to).andWhere((query) => query.whereNull('e.endsOn').orWhere('e.endsOn', '>=', from))
    .select('e.id as engagementId', 'e.personId', 'e.kind', 'e.legalEntityId', 'e.startsOn', 'e.endsOn', db.raw("trim(coalesce(p.called_name, p.given_name) || ' ' || p.family_name) AS name"))
    .orderBy(['p.familyName', 'p.givenName', 'e.startsOn']);

export type TaughtLesson = {
  occurrenceId: string; localDate: LocalDate; startMin: number; lengthMinutes: number; lessonTypeId: string; code: string; label: string; siteId: string; legalEntityId: string;
  plannedTeacherId: string | null; taughtById: string | null; state: string;
};

/** Lessons of the period that have begun; those still to come are not missing marks. */
export const lessonsBegun = (db: Db, { from, to }: Period, now: EpochSeconds): Promise<TaughtLesson[]> =>
  db('occurrence as o').join('lesson_type as t', 't.id', 'o.lessonTypeId').join('site as w', 'w.id', 'o.siteId').where('t.isTaught', 1).whereBetween('o.localDate', [from, to]).where('o.startsAt', '<=', now)
    .whereNot('o.state', 'moved').orderBy(['o.startsAt', 'o.id'])
    .select('o.id as occurrenceId', 'o.localDate', 'o.startMin', 'o.lengthMinutes', 'o.lessonTypeId', 't.code', 't.label', 'o.siteId', 'w.legalEntityId', 'o.plannedTeacherId', 'o.taughtById', 'o.state');

export type PaySeat = { occurrenceId: string; studentName: string; attendance: Attendance; source: string };
export const seatsOfLessons = (db: Db, { from, to }: Period): Promise<PaySeat[]> =>
  db('seat as s').join('occurrence as o', 'o.id', 's.occurrenceId').join('person as p', 'p.id', 's.studentId').whereBetween('o.localDate', [from, to])
    .select('s.occurrenceId', 's.attendance', 's.source', db.raw("trim(coalesce(p.called_name, p.given_name) || ' ' || p.family_name) AS student_name")).orderBy('p.givenName');

export const approvedTime = (db: Db, { from, to }: Period): Promise<TimeFacts[]> =>
  db('time_entry').where({ state: 'approved' }).whereBetween('localDate', [from, to]).orderBy('localDate').select('id as timeEntryId', 'engagementId', 'workType', 'localDate', 'minutes', 'siteId', 'note');
export const approvedMileage = (db: Db, { from, to }: Period): Promise<MileageFacts[]> =>
  db('mileage_entry as m').join('site as a', 'a.id', 'm.fromSiteId').join('site as b', 'b.id', 'm.toSiteId').where('m.state', 'approved').whereBetween('m.localDate', [from, to]).orderBy('m.localDate')
    .select('m.id as mileageEntryId', 'm.engagementId', 'm.localDate', 'm.milesTenths', 'm.rateMinorPerMile', db.raw("a.name || ' to ' || b.name AS route"));

export async function insertTimeEntry(trx: Trx, entry: { id: string; engagementId: string; workType: WorkType; localDate: LocalDate; minutes: number; note?: string; state: 'draft' | 'submitted' | 'approved'; createdBy?: string | null }): Promise<void> {
  await trx('time_entry').insert(entry);
}

/** Tuition of the lessons held, and pay, by month: a line's net is spread evenly over its lessons. */
export const tuitionAndPayByMonth = (db: Db, from: LocalDate): Promise<{ month: string; tuitionMinor: number; payMinor: number }[]> => db.raw(
  `WITH held AS (
     SELECT l.id, l.net_minor, substr(o.local_date, 1, 7) AS month, count(*) AS lessons FROM invoice_line l JOIN invoice i ON i.id = l.invoice_id AND i.state = 'issued'
     JOIN seat s ON s.enrolment_id = l.enrolment_id JOIN occurrence o ON o.id = s.occurrence_id AND o.local_date BETWEEN l.service_from AND l.service_to AND o.state <> 'moved'
     WHERE l.charge_kind = 'tuition' AND l.enrolment_id IS NOT NULL GROUP BY l.id, month),
   tuition AS (SELECT month, sum(share) AS minor FROM (
     SELECT month, 1.0 * net_minor * lessons / sum(lessons) OVER (PARTITION BY id) AS share FROM held) GROUP BY month),
   pay AS (SELECT substr(p.local_date, 1, 7) AS month, sum(p.amount_minor) AS minor FROM pay_line p WHERE p.kind <> 'reimbursement' GROUP BY month)
   SELECT coalesce(t.month, p.month) AS month, CAST(round(coalesce(t.minor, 0)) AS INTEGER) AS tuition_minor, coalesce(p.minor, 0) AS pay_minor
   FROM tuition t LEFT JOIN pay p ON p.month = t.month WHERE t.month >= substr(?, 1, 7) ORDER BY t.month`, [from]);
