import type { LocalDate } from '@/lib/time';
import type { Role } from '@/policies/ability';
import type { Db, Trx } from './connection';

export type AccessRow = { userId: string; personId: string; name: string; email: string; state: 'invited' | 'live' | 'disabled'; roles: string; lastSignInAt: number | null };

/** Who can sign in, with which hats. */
export const accessList = (db: Db): Promise<AccessRow[]> =>
  db('user_account as u').join('person as p', 'p.id', 'u.personId')
    .select<AccessRow[]>('u.id as userId', 'u.personId', 'u.email', 'u.state', 'u.lastSignInAt', db.raw("trim(p.given_name || ' ' || p.family_name) AS name"),
      db.raw("coalesce((SELECT group_concat(CASE g.role WHEN 'teacher' THEN CASE g.is_lead WHEN 1 THEN 'lead' ELSE 'teacher' END ELSE g.role END) FROM role_grant g WHERE g.user_id = u.id AND g.valid_to IS NULL), '') AS roles"))
    .orderBy('name');

export type WithoutAccess = { personId: string; name: string; email: string | null; suggested: Role };
/** Teachers, guardians and adult students who have no account yet. */
export const withoutAccess = (db: Db): Promise<WithoutAccess[]> =>
  db('person as p').leftJoin('user_account as u', 'u.personId', 'p.id').whereNull('u.id').where('p.state', 'live')
    .andWhere((query) => query.whereExists(db('engagement as e').whereRaw('e.person_id = p.id')).orWhereExists(db('relationship as r').whereRaw('r.adult_id = p.id')).orWhereExists(db('payer as y').whereRaw('y.person_id = p.id')))
    .select<WithoutAccess[]>('p.id as personId', db.raw("trim(p.given_name || ' ' || p.family_name) AS name"),
      db.raw("(SELECT c.value FROM contact_point c WHERE c.person_id = p.id AND c.kind = 'email' ORDER BY c.is_primary DESC LIMIT 1) AS email"),
      db.raw("CASE WHEN EXISTS (SELECT 1 FROM engagement e WHERE e.person_id = p.id) THEN 'teacher' WHEN EXISTS (SELECT 1 FROM relationship r WHERE r.adult_id = p.id) THEN 'guardian' ELSE 'student' END AS suggested"))
    .orderBy('name').limit(500);

export async function disableAccount(trx: Trx, userId: string): Promise<void> {
  await trx('user_account').where({ id: userId }).update({ state: 'disabled', sessionVersion: trx.raw('session_version + 1') });
}
export async function endRoles(trx: Trx, userId: string, on: LocalDate): Promise<void> {
  await trx('role_grant').where({ userId }).whereNull('validTo').update({ validTo: on });
}
