import { createHash } from 'node:crypto';
import type { Db, Trx } from './connection';

/** The tables an import writes rows of its own into; each has an id. */
export type MadeTable = 'term' | 'person' | 'contact_point' | 'engagement' | 'qualification' | 'availability' | 'pay_rate' | 'subject' | 'feature' | 'room' | 'family' | 'payer'
  | 'split_rule' | 'relationship' | 'consent' | 'student_ladder' | 'rung_credit' | 'series' | 'enrolment' | 'occurrence' | 'seat';
export type Made = { table: MadeTable; id: string; sheet: string; rowNo: number };
type MadeRow = { batchId: string; orderNo: number; tableName: MadeTable; rowId: string; sheet: string; rowNo: number; rowHash: string };

const CHUNK = 200;
const hashOf = (row: unknown) => createHash('sha256').update(JSON.stringify(row)).digest('hex');

function chunks<T>(list: readonly T[]): T[][] {
  return Array.from({ length: Math.ceil(list.length / CHUNK) }, (_, index) => list.slice(index * CHUNK, (index + 1) * CHUNK));
}

async function hashesNow(db: Db, table: MadeTable, ids: readonly string[]): Promise<Map<string, string>> {
  const hashes = new Map<string, string>();
  for (const part of chunks(ids)) {
    const rows = await db<{ id: string }>(table).whereIn('id', part);
    for (const row of rows) hashes.set(row.id, hashOf(row));
  }
  return hashes;
}

const tablesIn = (made: readonly { table: MadeTable }[]): MadeTable[] => [...new Set(made.map(({ table }) => table))];
const idsIn = (made: readonly Made[], table: MadeTable): string[] => made.filter((one) => one.table === table).map(({ id }) => id);

/** Writes down what an import made, in order, and how each row was left. */
export async function sealMade(trx: Trx, batchId: string, made: readonly Made[]): Promise<void> {
  const hashes = new Map<string, string>();
  for (const table of tablesIn(made)) for (const [id, hash] of await hashesNow(trx, table, idsIn(made, table))) hashes.set(`${table}:${id}`, hash);
  const rows = made.map(({ table, id, sheet, rowNo }, index): MadeRow => ({ batchId, orderNo: index + 1, tableName: table, rowId: id, sheet, rowNo, rowHash: hashes.get(`${table}:${id}`) ?? '' }));
  for (const part of chunks(rows)) await trx('import_made').insert(part);
}

export async function madeBy(db: Db, batchId: string): Promise<(Made & { hash: string })[]> {
  const rows: MadeRow[] = await db<MadeRow>('import_made').where({ batchId }).orderBy('orderNo');
  return rows.map(({ tableName, rowId, sheet, rowNo, rowHash }) => ({ table: tableName, id: rowId, sheet, rowNo, hash: rowHash }));
}

/** Rows that are no longer as the import left them, or gone. */
export async function changedSince(db: Db, made: readonly (Made & { hash: string })[]): Promise<Made[]> {
  const changed: Made[] = [];
  for (const table of tablesIn(made).filter((name) => !SHARED.includes(name))) {
    const now = await hashesNow(db, table, idsIn(made, table));
    changed.push(...made.filter((one) => one.table === table && now.get(one.id) !== one.hash));
  }
  return changed;
}

type Hanging = { child: string; column: string; /** The other end of a row that joins two: made by the import as well, or the row is somebody's use. */ other?: { column: string; table: MadeTable } };
/** Rows without an id that go with the row they hang on. */
const HANGING: Partial<Record<MadeTable, readonly Hanging[]>> = {
  room: [{ child: 'room_feature', column: 'room_id' }],
  occurrence: [{ child: 'hold', column: 'occurrence_id' }],
  family: [{ child: 'family_student', column: 'family_id', other: { column: 'student_id', table: 'person' } }],
  person: [{ child: 'student_rung', column: 'student_id' }, { child: 'family_student', column: 'student_id' }],
};
/** General words of the school, which others may use by now: they go only when nothing points at them any more. */
const SHARED: readonly MadeTable[] = ['term', 'subject', 'feature'];

export type Use = Made & { by: string };

/** Rows made by others that point at what the import made: an invoice, a marked lesson, an account. */
export async function usedSince(db: Db, made: readonly Made[]): Promise<Use[]> {
  const uses: Use[] = [];
  const own = new Set(made.map(({ table, id }) => `${table}:${id}`));
  for (const table of tablesIn(made).filter((name) => !SHARED.includes(name))) {
    const ones = made.filter((one) => one.table === table);
    for (const pointer of await pointersTo(db, table)) uses.push(...(await usesThrough(db, { ...pointer, ones, own })));
  }
  return uses;
}

type Pointer = { child: string; column: string; hasId: number };
const pointersTo = (db: Db, table: string): Promise<Pointer[]> =>
  db.raw(`SELECT m.name AS child, f."from" AS "column", EXISTS (SELECT 1 FROM pragma_table_info(m.name) i WHERE i.name = 'id') AS has_id FROM sqlite_master m, pragma_foreign_key_list(m.name) f WHERE m.type = 'table' AND f."table" = ? ORDER BY m.name`, [table]);

type Search = Pointer & { ones: readonly Made[]; own: ReadonlySet<string> };

async function usesThrough(db: Db, { ones, child, column, hasId, own }: Search): Promise<Use[]> {
  const other = otherEnd(ones[0]?.table, { child, column, hasId });
  if (other === null) return [];
  const byId = new Map(ones.map((one) => [one.id, one]));
  const uses: Use[] = [];
  for (const ids of chunks([...byId.keys()])) {
    const rows: { target: string; other: string }[] = await db(child).whereIn(column, ids).select(`${column} as target`, `${other.column} as other`);
    const foreign = rows.filter((row) => !own.has(`${other.table}:${row.other}`));
    uses.push(...foreign.flatMap(({ target }) => { const one = byId.get(target); return one ? [{ ...one, by: child }] : []; }));
  }
  return uses;
}

/** By which column a pointing row is known as the import's own: its id, or the other end of a row that joins two. Null: it simply hangs on. */
function otherEnd(table: MadeTable | undefined, { child, column, hasId }: Pointer): { column: string; table: string } | null {
  const hanging = table ? HANGING[table]?.find((hang) => hang.child === child && hang.column === column) : undefined;
  return hanging ? (hanging.other ?? null) : { column: hasId === 1 ? 'id' : column, table: child };
}

/** Takes back everything, the last first. Foreign keys still refuse whatever was overlooked. */
export async function unmake(trx: Trx, batchId: string, made: readonly Made[]): Promise<void> {
  for (const { table, id } of [...made].reverse()) {
    if (SHARED.includes(table) && (await isPointedAt(trx, table, id))) continue;
    for (const { child, column } of HANGING[table] ?? []) await trx(child).where(column, id).delete();
    await trx(table).where({ id }).delete();
  }
  await trx('import_made').where({ batchId }).delete();
}

async function isPointedAt(db: Db, table: MadeTable, id: string): Promise<boolean> {
  for (const { child, column } of await pointersTo(db, table)) {
    if (await db(child).where(column, id).first(db.raw('1 AS found'))) return true;
  }
  return false;
}
