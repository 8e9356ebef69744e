import { describe, expect, it } from 'vitest';
import type { Db } from '@/db/connection';
import { insertFamily, insertPayer } from '@/db/families';
import { insertContact } from '@/db/people';
import type { Role } from '@/policies/ability';
import { contextOf } from '../../../tests/support/context';
import { freshDb } from '../../../tests/support/fresh-db';
import { lanternStreet } from '../../../tests/factories/lantern-street';
import { transaction } from '@/db/transaction';
import { findAnything } from './find-anything';
import { pickPeople } from './pick-people';

async function school(): Promise<Db> {
  const db = freshDb();
  await lanternStreet(db);
  await transaction(db, async (trx) => {
    await insertFamily(trx, { id: 'vale', name: 'Vale', legalEntityId: 'lantern', currency: 'USD' });
    await insertPayer(trx, { id: 'payer-noor', familyId: 'vale', personId: 'noor' });
    await insertContact(trx, { id: 'phone', personId: 'noor', kind: 'phone', value: '0155 010 0142' });
  });
  return db;
}
const titles = async (db: Db, role: Role, text: string, over = {}) => (await findAnything({ text }, contextOf(db, role, over))).map(({ title, detail }) => `${title}: ${detail}`);

describe('Find', () => {
  it('finds students, families by payer and phone, rooms, teachers and dates for the desk', async () => {
    const db = await school();
    expect(await titles(db, 'desk', 'ada')).toEqual(['Ada Vale: student']);
    expect(await titles(db, 'desk', 'noor')).toEqual(['Vale family: Noor Vale']);
    expect(await titles(db, 'desk', '0155-010-0142')).toEqual(['Vale family: Noor Vale']);
    expect(await titles(db, 'desk', 'q2')).toEqual(['Q2: room, Quay']);
    expect(await titles(db, 'desk', 'ines')).toEqual(['Ines: teacher']);
    expect((await titles(db, 'desk', '17 Nov')).at(0)).toMatch(/^Tuesday 17 November: /);
  });
  it('shows a teacher their own students only, and no family', async () => {
    const db = await school();
    expect(await titles(db, 'teacher', 'vale', { personId: 'mara', taughtStudentIds: ['ben'] })).toEqual(['Ben Vale: student']);
  });
  it('shows a guardian their own child and nothing of the house', async () => {
    const db = await school();
    expect(await titles(db, 'guardian', 'a', { studentIds: ['ada'] })).toEqual([]);
    expect(await titles(db, 'guardian', 'vale', { studentIds: ['ada'] })).toEqual(['Ada Vale: student']);
    expect(await titles(db, 'guardian', 'q2', { studentIds: ['ada'] })).toEqual([]);
  });
  it('offers a form the same people and no others', async () => {
    const db = await school();
    expect((await pickPeople({ kind: 'student', text: 'vale' }, contextOf(db, 'teacher', { taughtStudentIds: ['ben'] }))).map(({ name }) => name)).toEqual(['Ben Vale']);
    expect(await pickPeople({ kind: 'teacher', text: 'mara' }, contextOf(db, 'guardian'))).toEqual([]);
  });
});
