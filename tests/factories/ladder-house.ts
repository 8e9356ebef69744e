import type { Knex } from 'knex';
import { randomUUID } from 'node:crypto';
import { installFirstLadder } from '../../db/ladder-install';
import { insertContact, insertPerson, insertRelationship } from '../../db/people';
import { insertSchool } from '../../db/school';
import { insertQualification } from '../../db/teachers';
import { insertTerm } from '../../db/terms';
import { insertSubject } from '../../db/lesson-types';
import { transaction } from '../../db/transaction';

/**
 * A school with the ladder that ships: Greta teaches up to level 4, Leif up to 10 (the lead), Otto teaches others.
 * Ines is 12 with two guardians, of whom only Ada sees progress; Theo is grown. Ids are the names.
 */
export async function ladderHouse(db: Knex): Promise<{ rungId: (code: string) => string }> {
  await transaction(db, async (trx) => {
    await insertSchool(trx, { name: 'Saltmarsh Music Rooms', locale: 'en-IE', zone: 'Europe/Dublin', currency: 'EUR' });
    await insertSubject(trx, { id: 'keyboard', code: 'keyboard_harmony', label: 'Keyboard harmony' });
    for (const [id, levelTo] of [['greta', 4], ['leif', 10], ['otto', 10]] as const) {
      await insertPerson(trx, { id, givenName: id.charAt(0).toUpperCase() + id.slice(1), familyName: 'Dahl' });
      await insertQualification(trx, { id: `q-${id}`, personId: id, subjectId: 'keyboard', levelFrom: 1, levelTo, grantedOn: '2024-09-01' });
    }
    await insertPerson(trx, { id: 'ines', givenName: 'Inés', familyName: 'Okafor', bornOn: '2014-03-02', isStudent: true });
    await insertPerson(trx, { id: 'theo', givenName: 'Theo', familyName: 'Marsh', bornOn: '1984-03-02', isStudent: true });
    for (const id of ['ada', 'bo']) {
      await insertPerson(trx, { id, givenName: id === 'ada' ? 'Ada' : 'Bo', familyName: 'Okafor' });
      await insertRelationship(trx, { id: `r-${id}`, childId: 'ines', adultId: id });
    }
    for (const id of ['ada', 'bo', 'theo', 'ines']) await insertContact(trx, { id: `c-${id}`, personId: id, kind: 'email', value: `${id}@example.org` });
    await trx('relationship').where({ id: 'r-bo' }).update({ seesProgress: 0 });
    await insertTerm(trx, { id: 'autumn', name: 'Autumn', yearLabel: '2026/27', startsOn: '2026-09-07', endsOn: '2026-12-19', state: 'published' });
    await installFirstLadder(trx, { subjectId: 'keyboard', startsOn: '2026-09-01', createdBy: null, newId: randomUUID });
  });
  const rungs: { id: string; code: string }[] = await db('rung').select('id', 'code');
  const ids = new Map(rungs.map(({ id, code }) => [code, id]));
  return { rungId: (code) => ids.get(code) ?? code };
}

/** Rungs the lead has placed a student on. */
export async function credited(db: Knex, studentId: string, rungIds: readonly string[]): Promise<void> {
  for (const rungId of rungIds) await db('rung_credit').insert({ id: randomUUID(), studentId, rungId, cause: 'placement', reason: 'Placed at the trial lesson', byId: 'leif', creditedOn: '2026-09-07', at: 1_788_000_000 });
}
