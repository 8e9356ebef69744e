import type { EpochSeconds, LocalDate } from '@/lib/time';
import type { Db, Trx } from './connection';

export type Enrolment = {
  id: string; studentId: string; familyId: string; subjectId: string; lessonTypeId: string; seriesId: string | null; lengthMinutes: number;
  teacherId: string | null; siteId: string; tuitionModel: 'per_term_count' | 'per_term_flat' | 'monthly_flat' | 'per_lesson' | 'package' | 'group_seat';
  unitPriceMinor: number | null; startsOn: LocalDate; endsOn: LocalDate | null;
  state: 'draft' | 'offered' | 'active' | 'paused' | 'notice_given' | 'ended' | 'refused';
};
type NewEnrolment = Enrolment & { trialId?: string | null; acceptedBy?: string | null; acceptedAt?: EpochSeconds; termsVersion?: string; externalKey?: string; createdBy?: string | null; onLadder?: number };

export async function insertEnrolment(trx: Trx, enrolment: NewEnrolment): Promise<void> {
  await trx('enrolment').insert(enrolment);
}

export async function setEnrolmentSeries(trx: Trx, id: string, seriesId: string): Promise<void> {
  await trx('enrolment').where({ id }).update({ seriesId });
}

export const LIVE_ENROLMENTS = ['active', 'paused', 'notice_given'] as const;
export const enrolmentsOfStudent = (db: Db, studentId: string): Promise<(Enrolment & { teacherName: string | null; subjectLabel: string; weekday: number | null; startMin: number | null; roomName: string | null; siteName: string })[]> =>
  db('enrolment as e').join('subject as j', 'j.id', 'e.subjectId').join('site as w', 'w.id', 'e.siteId').leftJoin('person as p', 'p.id', 'e.teacherId')
    .leftJoin('series as s', 's.id', 'e.seriesId').leftJoin('room as r', 'r.id', 's.roomId').where('e.studentId', studentId)
    .select('e.*', 'j.label as subjectLabel', 'w.name as siteName', 's.weekday', 's.startMin', 'r.name as roomName',
      db.raw("trim(p.given_name || ' ' || p.family_name) AS teacher_name"))
    .orderBy('e.startsOn', 'desc');

export async function insertSeries(trx: Trx, series: {
  id: string; lessonTypeId: string; subjectId: string | null; title?: string; teacherId: string | null; roomId: string | null; siteId: string; zone: string;
  weekday: number; startMin: number; lengthMinutes: number; firstOn: LocalDate; lastOn: LocalDate; termId: string | null; followsSeriesId?: string | null;
}): Promise<void> {
  await trx('series').insert(series);
}

export async function recordEnrolmentChange(trx: Trx, change: {
  id: string; enrolmentId: string; kind: string; effectiveOn: LocalDate; before: unknown; after: unknown; byId: string | null; at: EpochSeconds;
}): Promise<void> {
  const { before, after, ...rest } = change;
  await trx('enrolment_change').insert({ ...rest, beforeJson: JSON.stringify(before), afterJson: JSON.stringify(after) });
}

/** The level a student works at: that of the lowest rung not yet passed or credited; 1 for a beginner. */
export async function levelOfStudent(db: Db, studentId: string): Promise<number> {
  const [row]: { level: number | null }[] = await db('student_rung as s').join('rung_text as t', (join) => join.on('t.rungId', 's.rungId').andOn('t.editionId', 's.editionId'))
    .join('level as v', 'v.id', 't.levelId').where('s.studentId', studentId).whereNotIn('s.state', ['passed', 'credited']).min('v.no as level');
  return row?.level ?? 1;
}
