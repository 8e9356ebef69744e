import type { EpochSeconds, LocalDate } from '@/lib/time';
import type { Db, Trx } from './connection';

export type Person = {
  id: string; givenName: string; familyName: string; calledName: string | null; bornOn: LocalDate | null; language: string;
  isStudent: boolean; reachSemitones: number; state: 'live' | 'archived' | 'erased';
};
type PersonRow = Omit<Person, 'isStudent'> & { isStudent: number };
type NewPerson = { id: string; givenName: string; familyName: string } & Partial<Omit<Person, 'id' | 'givenName' | 'familyName'>> & { externalKey?: string };

const COLUMNS = ['id', 'givenName', 'familyName', 'calledName', 'bornOn', 'language', 'isStudent', 'reachSemitones', 'state'] as const;
const toPerson = (row: PersonRow): Person => ({ ...row, isStudent: row.isStudent === 1 });

export async function insertPerson(trx: Trx, { isStudent = false, ...person }: NewPerson): Promise<void> {
  await trx('person').insert({ ...person, isStudent: isStudent ? 1 : 0 });
}

export async function findPerson(db: Db, id: string): Promise<Person | undefined> {
  const row = await db<PersonRow>('person').where({ id }).first(...COLUMNS);
  return row && toPerson(row);
}

export async function findPeople(db: Db, ids: readonly string[]): Promise<Person[]> {
  const rows: PersonRow[] = await db('person').whereIn('id', [...ids]).select(...COLUMNS);
  return rows.map(toPerson);
}

export async function setReach(trx: Trx, id: string, reachSemitones: number): Promise<void> {
  await trx('person').where({ id }).update({ reachSemitones }).increment('rowVersion', 1);
}

/** "Wren Adair"; the name a person is called by stands before the given one. */
export const fullName = ({ givenName, calledName, familyName }: Pick<Person, 'givenName' | 'calledName' | 'familyName'>): string =>
  `${calledName ?? givenName} ${familyName}`.trim();

type NewContact = { id: string; personId: string; kind: 'email' | 'phone'; value: string; label?: string };

export async function insertContact(trx: Trx, contact: NewContact): Promise<void> {
  await trx('contact_point').insert(contact).onConflict(['person_id', 'kind', 'value']).ignore();
}

export type Contact = { personId: string; kind: 'email' | 'phone'; value: string; isPrimary: number };
type NewRelationship = { id: string; childId: string; adultId: string; kind?: 'mother' | 'father' | 'guardian' | 'other' };
export async function insertRelationship(trx: Trx, relationship: NewRelationship): Promise<void> {
  await trx('relationship').insert(relationship).onConflict(['child_id', 'adult_id']).ignore();
}

export const guardiansOf = (db: Db, childId: string): Promise<{ adultId: string; givenName: string; familyName: string }[]> =>
  db('relationship as r').join('person as p', 'p.id', 'r.adultId').where('r.childId', childId).where('r.hasLegalCare', 1)
    .where('r.getsMessages', 1).select('r.adultId', 'p.givenName', 'p.familyName').orderBy('r.createdAt');

export async function insertConsent(trx: Trx, consent: {
  id: string; personId: string; givenById: string | null; purpose: string; answer: 'yes' | 'no'; textVersion: string; method: string; givenAt: EpochSeconds;
}): Promise<void> {
  await trx('consent').insert(consent);
}
