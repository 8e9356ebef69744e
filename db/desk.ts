import type { LocalDate } from '@/lib/time';
import type { Db } from './connection';
import { LIVE_STATES } from './occurrences';

/** Lessons of past days whose mark is missing, by teacher. They hold up pay until somebody marks them. */
export const unmarkedByTeacher = (db: Db, before: LocalDate, since: LocalDate): Promise<{ teacherId: string; teacherName: string; lessons: number }[]> =>
  db('occurrence as o').join('seat as s', 's.occurrenceId', 'o.id').join('lesson_type as t', 't.id', 'o.lessonTypeId').join('person as p', 'p.id', 'o.plannedTeacherId')
    .where('o.localDate', '<', before).where('o.localDate', '>=', since).where('s.attendance', 'expected').where('t.isTaught', 1).whereIn('o.state', LIVE_STATES)
    .groupBy('p.id').select('p.id as teacherId', db.raw("trim(p.given_name || ' ' || p.family_name) AS teacher_name"), db.raw('count(DISTINCT o.id) AS lessons')).orderBy('lessons', 'desc');

export async function countFailedMails(db: Db): Promise<number> {
  const [row]: { count: number }[] = await db('outbox').where({ state: 'given_up' }).count('id as count');
  return row?.count ?? 0;
}

/** Background checks of teachers that run out before a day, newest document each. */
export const checksExpiringBefore = (db: Db, before: LocalDate): Promise<{ name: string; expiresOn: LocalDate }[]> =>
  db('engagement as e').join('person as p', 'p.id', 'e.personId').join('staff_document as d', 'd.personId', 'p.id').where('d.kind', 'background_check').whereNull('e.endsOn')
    .groupBy('p.id').havingRaw('max(d.expires_on) < ?', [before])
    .select(db.raw("trim(p.given_name || ' ' || p.family_name) AS name"), db.raw('max(d.expires_on) AS expires_on'));

/** The first guardian and their telephone, for a call from the desk. */
export async function guardianLines(db: Db, studentIds: readonly string[]): Promise<Map<string, string>> {
  const rows: { childId: string; line: string }[] = await db('relationship as r').join('person as p', 'p.id', 'r.adultId').whereIn('r.childId', [...studentIds]).where('r.hasLegalCare', 1)
    .groupBy('r.childId')
    .select('r.childId', db.raw(`trim(p.given_name || ' ' || p.family_name) || coalesce(', ' || (SELECT c.value FROM contact_point c WHERE c.person_id = p.id AND c.kind = 'phone' LIMIT 1), '') AS line`));
  return new Map(rows.map(({ childId, line }) => [childId, line]));
}
