import type { LocalDate } from '@/lib/time';
import type { Db, Trx } from './connection';

export type Teacher = { id: string; givenName: string; familyName: string; calledName: string | null; colour: string; engagementId: string; kind: 'employee' | 'contractor' };

/** Everybody with an engagement on this day, by name. */
export const liveTeachers = (db: Db, today: LocalDate): Promise<Teacher[]> =>
  db('engagement as e').join('person as p', 'p.id', 'e.personId').where('e.startsOn', '<=', today)
    .andWhere((query) => query.whereNull('e.endsOn').orWhere('e.endsOn', '>=', today)).where('p.state', 'live')
    .select('p.id', 'p.givenName', 'p.familyName', 'p.calledName', 'e.colour', 'e.id as engagementId', 'e.kind')
    .orderBy(['p.familyName', 'p.givenName']);

export type Qualification = { personId: string; subjectId: string; levelFrom: number; levelTo: number };
export const qualificationsOn = (db: Db, subjectId: string, date: LocalDate): Promise<Qualification[]> =>
  db<Qualification & { grantedOn: LocalDate; endsOn: LocalDate | null }>('qualification').where({ subjectId }).where('grantedOn', '<=', date)
    .andWhere((query) => query.whereNull('endsOn').orWhere('endsOn', '>=', date)).select('personId', 'subjectId', 'levelFrom', 'levelTo');

export type AvailabilityRow = { personId: string; siteId: string | null; weekday: number; fromMin: number; toMin: number };
export const availabilityOn = (db: Db, date: LocalDate): Promise<AvailabilityRow[]> =>
  db<AvailabilityRow & { validFrom: LocalDate; validTo: LocalDate | null }>('availability').where('validFrom', '<=', date)
    .andWhere((query) => query.whereNull('validTo').orWhere('validTo', '>', date))
    .select('personId', 'siteId', 'weekday', 'fromMin', 'toMin').orderBy(['weekday', 'fromMin']);

/** Teachers whose background check is valid on this day: nobody else is planned with a student under age. */
export async function clearedTeachers(db: Db, date: LocalDate): Promise<Set<string>> {
  const rows: { personId: string }[] = await db('staff_document').where({ kind: 'background_check' }).where('issuedOn', '<=', date)
    .andWhere((query) => query.whereNull('expiresOn').orWhere('expiresOn', '>=', date)).distinct('personId');
  return new Set(rows.map((row) => row.personId));
}

export async function insertEngagement(trx: Trx, engagement: {
  id: string; personId: string; legalEntityId: string; kind: 'employee' | 'contractor'; startsOn: LocalDate; colour?: string;
}): Promise<void> {
  await trx('engagement').insert(engagement);
}

export async function insertQualification(trx: Trx, qualification: {
  id: string; personId: string; subjectId: string; levelFrom: number; levelTo: number; grantedOn: LocalDate; grantedBy?: string | null;
}): Promise<void> {
  await trx('qualification').insert(qualification);
}

export async function insertAvailability(trx: Trx, rows: (AvailabilityRow & { id: string })[]): Promise<void> {
  if (rows.length > 0) await trx('availability').insert(rows);
}

export async function insertStaffDocument(trx: Trx, document: {
  id: string; personId: string; kind: 'background_check' | 'contract' | 'insurance' | 'qualification'; issuedOn: LocalDate; expiresOn: LocalDate | null;
}): Promise<void> {
  await trx('staff_document').insert(document);
}
