import { AbilityBuilder, createMongoAbility } from '@casl/ability';
import fc from 'fast-check';
import type { Knex } from 'knex';
import { beforeAll, describe, expect, it } from 'vitest';
import { freshDb } from '@/tests/support/fresh-db';
import { seededRandom, type Random } from '@/db/seeds/random';
import { abilityFor, may, ROLES } from './ability';
import { SUBJECTS, type Action, type Actor, type AppAbility, type SubjectName } from './types';
import { allowedRows } from './where';

const ACTIONS: Action[] = ['read', 'create', 'update', 'approve', 'manage', 'export'];
const FIELDS = ['id', 'studentId', 'payerId', 'personId', 'actorId', 'assessorId', 'plannedTeacherId', 'taughtById', 'askedByUserId', 'familyId', 'occurrenceId'] as const;
/** Ids that differ by case, by a space or by a sign, an empty one and a hostile one. */
const IDS = ['ada', 'Ada', 'ada ', 'ben', 'theo', 'mara', 'é', '漢', '', "x' OR 1=1 --", '%', '1'];
type Row = Record<(typeof FIELDS)[number], string | null> & { rowNo: number };

const rowsOf = (random: Random, count: number): Row[] => Array.from({ length: count }, (_, rowNo) => {
  const draw = () => (random() < 0.25 ? null : (IDS[Math.floor(random() * IDS.length)] ?? null));
  return { rowNo, ...Object.fromEntries(FIELDS.map((field) => [field, draw()])) } as Row;
});

async function probe(rows: readonly Row[]): Promise<Knex> {
  const db = freshDb();
  await db.raw(`CREATE TABLE probe (row_no INTEGER PRIMARY KEY, ${FIELDS.map((field) => `${field.replace(/[A-Z]/g, (letter) => `_${letter.toLowerCase()}`)} TEXT`).join(', ')}) STRICT`);
  for (let from = 0; from < rows.length; from += 50) await db('probe').insert(rows.slice(from, from + 50));
  return db;
}

const byTable = async (db: Knex, ability: AppAbility, action: Action, name: SubjectName): Promise<number[]> =>
  (await db('probe as p').where(allowedRows(ability, action, name, 'p')).orderBy('p.rowNo').select<{ rowNo: number }[]>('p.rowNo')).map(({ rowNo }) => rowNo);
const byMemory = (rows: readonly Row[], ability: AppAbility, action: Action, name: SubjectName): number[] =>
  rows.filter((row) => may(ability, action, name, row)).map(({ rowNo }) => rowNo);

const someIds = fc.subarray(IDS, { maxLength: 4 });
const anyActor: fc.Arbitrary<Omit<Actor, 'role'>> = fc.record({
  userId: fc.constantFrom(...IDS), personId: fc.constantFrom(...IDS), isLead: fc.boolean(), studentIds: someIds, payerIds: someIds, familyIds: someIds, taughtStudentIds: someIds, coveredTodayIds: someIds,
});

describe('a list shows exactly the records that may be opened one by one', () => {
  const rows = rowsOf(seededRandom(7), 1200);
  let actors: Omit<Actor, 'role'>[];
  beforeAll(() => { actors = fc.sample(anyActor, { seed: 11, numRuns: 4 }); });

  it.each(ROLES)('the grants of a %s, every subject and action, over 1,200 rows with gaps', async (role) => {
    const db = await probe(rows);
    let [all, part] = [0, 0];
    for (const actor of actors) {
      const ability = abilityFor({ ...actor, role });
      for (const name of SUBJECTS) {
        for (const action of ACTIONS) {
          const expected = byMemory(rows, ability, action, name);
          expect(await byTable(db, ability, action, name), `${action} ${name}`).toEqual(expected);
          if (expected.length > 0) [all, part] = expected.length === rows.length ? [all + 1, part] : [all, part + 1];
        }
      }
    }
    // The comparison means something only where some rows are granted and others are not.
    expect(part).toBeGreaterThan(role === 'owner' ? 0 : 5);
    expect(all).toBeGreaterThan(0);
  }, 60_000);

  it('300 random sets of grants', async () => {
    const few = rows.slice(0, 120);
    const db = await probe(few);
    const field = fc.constantFrom(...FIELDS);
    const wanted = fc.oneof(fc.constantFrom(...IDS), someIds.map(($in) => ({ $in })));
    const grant = fc.record({ action: fc.constantFrom<Action>('read', 'update', 'manage'), name: fc.constantFrom<SubjectName>('Seat', 'Student'), conditions: fc.option(fc.dictionary(field, wanted, { minKeys: 1, maxKeys: 3 }), { nil: undefined }) });
    await fc.assert(fc.asyncProperty(fc.array(grant, { maxLength: 5 }), async (grants) => {
      const { can: allow, build } = new AbilityBuilder<AppAbility>(createMongoAbility);
      for (const { action, name, conditions } of grants) allow(action, name, conditions);
      const ability = build();
      for (const action of ['read', 'update'] as const) expect(await byTable(db, ability, action, 'Seat')).toEqual(byMemory(few, ability, action, 'Seat'));
    }), { numRuns: 300 });
  }, 60_000);
});

describe('what has no faithful SQL is refused, not guessed', () => {
  const ability = (define: (builder: AbilityBuilder<AppAbility>) => void): AppAbility => {
    const builder = new AbilityBuilder<AppAbility>(createMongoAbility);
    define(builder);
    return builder.build();
  };
  it('a rule that takes away', async () => {
    const db = await probe([]);
    const taking = ability(({ can, cannot }) => { can('read', 'Seat'); cannot('read', 'Seat', { id: 'ada' }); });
    expect(() => db('probe as p').where(allowedRows(taking, 'read', 'Seat', 'p')).toSQL()).toThrow('only grant');
  });
  it.each([{ id: null }, { id: { $ne: 'ada' } }, { id: { $exists: true } }])('the condition %j', async (conditions) => {
    const db = await probe([]);
    const odd = ability(({ can }) => { can('read', 'Seat', conditions as never); });
    expect(() => db('probe as p').where(allowedRows(odd, 'read', 'Seat', 'p')).toSQL()).toThrow('no SQL for the condition on id');
  });
  it('no grant at all shows no row', async () => {
    const db = await probe(rowsOf(seededRandom(3), 20));
    expect(await byTable(db, ability(() => undefined), 'read', 'Seat')).toEqual([]);
  });
  it('a field that the table calls otherwise is looked for there', async () => {
    const db = await probe(rowsOf(seededRandom(5), 200));
    const own = ability(({ can }) => { can('read', 'Seat', { studentId: 'ada' }); });
    const found: { payerId: string | null }[] = await db('probe as p').where(allowedRows(own, 'read', 'Seat', { alias: 'p', columns: { studentId: 'p.payerId' } })).select('p.payerId');
    expect(new Set(found.map(({ payerId }) => payerId))).toEqual(new Set(['ada']));
  });
});
