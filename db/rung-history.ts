import type { EpochSeconds, LocalDate } from '@/lib/time';
import type { Db, Trx } from './connection';

export type Recheck = { id: string; studentId: string; rungId: string; reasonPrivate: string; byId: string; askedOn: LocalDate; at: EpochSeconds };
export async function insertRecheck(trx: Trx, recheck: Recheck): Promise<void> {
  await trx('recheck_request').insert(recheck);
}

export type AskedRecheck = { rungId: string; reasonPrivate: string; askedOn: LocalDate; byName: string };
/** Every re-check that was asked for a student, newest first; whether one is still open follows from the hearings after it. */
export const rechecksOf = (db: Db, studentId: string): Promise<AskedRecheck[]> =>
  db('recheck_request as q').join('person as p', 'p.id', 'q.byId').where('q.studentId', studentId).orderBy('q.at', 'desc')
    .select<AskedRecheck[]>('q.rungId', 'q.reasonPrivate', 'q.askedOn', db.raw("trim(coalesce(p.called_name, p.given_name) || ' ' || p.family_name) AS by_name"));

export type RungCredit = { rungId: string; reason: string; creditedOn: LocalDate; byName: string };
/** Rungs a student was given without a hearing: by placement, from an earlier edition, by the lead's word. */
export const creditsOf = (db: Db, studentId: string): Promise<RungCredit[]> =>
  db('rung_credit as c').join('person as p', 'p.id', 'c.byId').where('c.studentId', studentId)
    .select<RungCredit[]>('c.rungId', 'c.reason', 'c.creditedOn', db.raw("trim(coalesce(p.called_name, p.given_name) || ' ' || p.family_name) AS by_name"));
