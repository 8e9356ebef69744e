import type { AppAbility } from '@/policies/ability';
import { allowedRows } from '@/policies/where';
import type { Db } from './connection';

const like = (text: string) => `%${text.replace(/[\\%_]/g, (sign) => `\\${sign}`)}%`;
const NAME = "trim(p.given_name || ' ' || p.family_name)";

export const findStudents = (db: Db, ability: AppAbility, text: string): Promise<{ id: string; name: string }[]> =>
  db('person as p').where('p.isStudent', 1).where('p.state', 'live').whereRaw(`${NAME} LIKE ? ESCAPE '\\'`, [like(text)]).where(allowedRows(ability, 'read', 'Student', 'p'))
    .select('p.id', db.raw(`${NAME} AS name`)).orderBy('p.familyName').limit(8);

export const findFamilies = (db: Db, text: string): Promise<{ id: string; name: string; payers: string | null }[]> =>
  db('family as f').where((query) => query.whereRaw("f.name LIKE ? ESCAPE '\\'", [like(text)]).orWhereExists(
    db('payer as y').join('person as p', 'p.id', 'y.personId').whereRaw('y.family_id = f.id').whereRaw(`(${NAME} LIKE ? ESCAPE '\\' OR EXISTS (SELECT 1 FROM contact_point c WHERE c.person_id = p.id AND replace(c.value, ' ', '') LIKE ? ESCAPE '\\'))`, [like(text), like(text.replace(/\s/g, ''))])))
    .select('f.id', 'f.name', db.raw(`(SELECT group_concat(${NAME}, ', ') FROM payer y JOIN person p ON p.id = y.person_id WHERE y.family_id = f.id) AS payers`)).orderBy('f.name').limit(6);

export const findTeachersByName = (db: Db, text: string): Promise<{ id: string; name: string }[]> =>
  db('engagement as e').join('person as p', 'p.id', 'e.personId').whereNull('e.endsOn').whereRaw(`${NAME} LIKE ? ESCAPE '\\'`, [like(text)]).select('p.id', db.raw(`${NAME} AS name`)).limit(5);

export const findRoomsByName = (db: Db, text: string): Promise<{ id: string; name: string; siteName: string }[]> =>
  db('room as r').join('site as w', 'w.id', 'r.siteId').where('r.state', 'live').whereRaw("r.name LIKE ? ESCAPE '\\'", [like(text)]).select('r.id', 'r.name', 'w.name as siteName').limit(5);

export const findInvoices = (db: Db, text: string): Promise<{ id: string; documentNo: string; familyName: string }[]> =>
  db('invoice as i').join('family as f', 'f.id', 'i.familyId').where('i.state', 'issued').whereRaw("i.document_no LIKE ? ESCAPE '\\'", [like(text)]).select('i.id', 'i.documentNo', 'f.name as familyName').limit(5);
