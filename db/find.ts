import { nameMatches } from '@/lib/people/names';
import type { AppAbility } from '@/policies/ability';
import { allowedRows } from '@/policies/where';
import type { Db } from './connection';

const like = (text: string) => `%${text.replace(/[\\%_]/g, (sign) => `\\${sign}`)}%`;
const NAME = "trim(coalesce(p.called_name, p.given_name) || ' ' || p.family_name)";
type Named = { id: string; name: string };

/** Letters are compared as people type them on a plain keyboard, which the database cannot; a school's list of names is short. */
const named = <T extends Named>(rows: readonly T[], text: string, most: number): T[] => rows.filter(({ name }) => nameMatches(name, text)).slice(0, most);

export async function findStudents(db: Db, ability: AppAbility, text: string): Promise<Named[]> {
  const rows = await db('person as p').where('p.isStudent', 1).where('p.state', 'live').where(allowedRows(ability, 'read', 'Student', 'p'))
    .select<Named[]>('p.id', db.raw(`${NAME} AS name`)).orderBy(['p.familyName', 'p.givenName']);
  return named(rows, text, 8);
}

type FoundFamily = Named & { payers: string | null; phones: string | null };
/** By the family's name, a payer's name or address, or the digits of a telephone number. */
export async function findFamilies(db: Db, text: string): Promise<FoundFamily[]> {
  const contacts = (kind: string) => `(SELECT group_concat(c.value, ' ') FROM payer y JOIN contact_point c ON c.person_id = y.person_id AND c.kind = '${kind}' WHERE y.family_id = f.id)`;
  const rows: (FoundFamily & { emails: string | null })[] = await db('family as f').where('f.state', 'live').orderBy('f.name').select('f.id', 'f.name',
    db.raw(`(SELECT group_concat(${NAME}, ', ') FROM payer y JOIN person p ON p.id = y.person_id WHERE y.family_id = f.id) AS payers`), db.raw(`${contacts('email')} AS emails`), db.raw(`${contacts('phone')} AS phones`));
  const digits = text.replace(/\D/g, '');
  const hasPhone = (phones: string | null) => digits.length >= 4 && (phones ?? '').replace(/\D/g, '').includes(digits);
  return rows.filter(({ name, payers, emails, phones }) => nameMatches(`${name} ${payers ?? ''} ${emails ?? ''}`, text) || hasPhone(phones)).slice(0, 6);
}

export async function findTeachersByName(db: Db, text: string): Promise<Named[]> {
  const rows = await db('engagement as e').join('person as p', 'p.id', 'e.personId').whereNull('e.endsOn').groupBy('p.id').select<Named[]>('p.id', db.raw(`${NAME} AS name`)).orderBy('name');
  return named(rows, text, 5);
}

export async function findRoomsByName(db: Db, text: string): Promise<(Named & { siteName: string })[]> {
  const rows = await db('room as r').join('site as w', 'w.id', 'r.siteId').where('r.state', 'live').select<(Named & { siteName: string })[]>('r.id', 'r.name', 'w.name as siteName').orderBy('r.name');
  return named(rows, text, 5);
}

export const findInvoices = (db: Db, text: string): Promise<{ id: string; documentNo: string; familyName: string }[]> =>
  db('invoice as i').join('family as f', 'f.id', 'i.familyId').where('i.state', 'issued').whereRaw("i.document_no LIKE ? ESCAPE '\\'", [like(text)]).select('i.id', 'i.documentNo', 'f.name as familyName').limit(5);
