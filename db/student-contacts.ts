import type { Db } from './connection';

export type StudentContact = { personId: string; name: string; relation: 'mother' | 'father' | 'guardian' | 'other' | 'self'; phone: string | null; email: string | null };

const first = (kind: 'email' | 'phone') => `(SELECT c.value FROM contact_point c WHERE c.person_id = p.id AND c.kind = '${kind}' ORDER BY c.is_primary DESC, c.created_at LIMIT 1) AS ${kind}`;
const NAME = "trim(coalesce(p.called_name, p.given_name) || ' ' || p.family_name) AS name";

/** Whom to call about a student: the adults with legal care in the order they were named, then the student’s own number or address. */
export async function contactsOfStudent(db: Db, studentId: string): Promise<StudentContact[]> {
  const adults: StudentContact[] = await db('relationship as r').join('person as p', 'p.id', 'r.adultId').where({ 'r.childId': studentId, 'r.hasLegalCare': 1 }).orderBy(['r.createdAt', 'r.id'])
    .select('p.id as personId', 'r.kind as relation', db.raw(NAME), db.raw(first('phone')), db.raw(first('email')));
  const own: StudentContact[] = await db('person as p').where('p.id', studentId)
    .select('p.id as personId', db.raw("'self' AS relation"), db.raw(NAME), db.raw(first('phone')), db.raw(first('email')));
  return [...adults, ...own.filter(({ phone, email }) => phone !== null || email !== null)];
}
