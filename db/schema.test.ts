import { readFileSync, readdirSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { freshDb } from '@/tests/support/fresh-db';
import { migrate } from './migrate';

const FOLDER = 'db/migrations';
const files = readdirSync(FOLDER).filter((name) => name.endsWith('.sql')).sort();
const written = files.map((name) => readFileSync(`${FOLDER}/${name}`, 'utf8')).join('\n').replace(/^\s*--.*$/gm, '');

/** What stands after every file has run: a later file may drop a thing and make it anew. */
function namesOf(kind: string): string[] {
  const names = new Set<string>();
  for (const [, verb, name = ''] of written.matchAll(new RegExp(`^(CREATE|DROP) (?:UNIQUE )?${kind} (\\w+)`, 'gm'))) {
    if (verb === 'DROP' ? !names.delete(name) : names.has(name)) throw new Error(`${String(verb)} ${name} does not follow from what came before`);
    if (verb === 'CREATE') names.add(name);
  }
  return [...names].sort();
}

type Made = { type: string; name: string };
/** The migration tool keeps two small tables of its own. */
async function made(type: 'table' | 'trigger' | 'index' | 'view'): Promise<string[]> {
  const rows: Made[] = await freshDb()('sqlite_master').where({ type }).whereNotNull('sql').whereNot('name', 'like', 'sqlite_%').whereNot('name', 'like', 'schema_migration%').select('name');
  return rows.map(({ name }) => name).sort();
}

describe('the schema is what the migrations say', () => {
  it.each([['TABLE', 'table', 90], ['TRIGGER', 'trigger', 120], ['INDEX', 'index', 60], ['VIEW', 'view', 1]] as const)('every %s stands under its name', async (word, type, atLeast) => {
    const names = namesOf(word);
    expect(names.length).toBeGreaterThanOrEqual(atLeast);
    expect(await made(type)).toEqual(names);
  });
  it('every table is STRICT', async () => {
    const tables: { name: string; type: string; strict: number }[] = await freshDb().raw('PRAGMA table_list');
    const ours = tables.filter(({ name, type }) => type === 'table' && !name.startsWith('sqlite_') && !name.startsWith('schema_migration'));
    expect(ours.length).toBe(namesOf('TABLE').length);
    expect(ours.filter(({ strict }) => strict !== 1).map(({ name }) => name)).toEqual([]);
  });
  it('every reference points at a table that is there, and no row points at nothing', async () => {
    const db = freshDb();
    const tables: string[] = namesOf('TABLE');
    const missing: string[] = [];
    for (const table of tables) {
      const references: { table: string; to: string | null }[] = await db.raw(`PRAGMA foreign_key_list(${table})`);
      missing.push(...references.filter((reference) => !tables.includes(reference.table)).map((reference) => `${table} → ${reference.table}`));
    }
    expect(missing).toEqual([]);
    expect(await db.raw('PRAGMA foreign_key_check')).toEqual([]);
    expect(await db.raw('PRAGMA integrity_check')).toEqual([{ integrityCheck: 'ok' }]);
  });
  it('a second run of the migrations changes nothing', async () => {
    const db = freshDb();
    expect(await migrate(db)).toEqual([]);
    expect(await db('schema_migration').orderBy('id').pluck('name')).toEqual(files);
  });
  it('every trigger speaks a short code that the program can recognise', () => {
    const bodies = written.split(/^CREATE TRIGGER /m).slice(1);
    for (const body of bodies) expect(body).toMatch(/RAISE\(ABORT, '[a-z_]+'\)/);
  });
});
