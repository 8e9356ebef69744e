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
    const rows: { id: string }[] = await db(table).whereIn('id', part);
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
  for (const table of tablesIn(made)) {
    const now = await hashesNow(db, table, idsIn(made, table));
    changed.push(...made.filter((one) => one.table === table && now.get(one.id) !== one.hash));
  }
  return changed;
}

/** Tables whose rows go with the row they hang on. */
const HANGING: Partial<Record<MadeTable, readonly [string, string][]>> = {
  room: [['room_feature', 'room_id']], occurrence: [['hold', 'occurrence_id']], family: [['family_student', 'family_id']], person: [['student_rung', 'student_id'], ['family_student', 'student_id']],
};

export type Use = Made & { by: string };

/** Rows made by others that point at what the import made: an invoice, a marked lesson, an account. */
export async function usedSince(db: Db, made: readonly Made[]): Promise<Use[]> {
  const uses: Use[] = [];
  const own = new Set(made.map(({ table, id }) => `${table}:${id}`));
  for (const table of tablesIn(made)) {
    for (const { child, columnName } of await pointersTo(db, table)) {
      if ((HANGING[table] ?? []).some(([name, column]) => name === child && column === columnName)) continue;
      uses.push(...(await usesThrough(db, { made: made.filter((one) => one.table === table), child, columnName, own })));
    }
  }
  return uses;
}

const pointersTo = (db: Db, table: string): Promise<{ child: string; columnName: string }[]> =>
  db.raw(`SELECT m.name AS child, f."from" AS column_name FROM sqlite_master m, pragma_foreign_key_list(m.name) f WHERE m.type = 'table' AND f."table" = ? ORDER BY m.name`, [table]);

type Pointer = { made: readonly Made[]; child: string; columnName: string; own: ReadonlySet<string> };

async function usesThrough(db: Db, { made, child, columnName, own }: Pointer): Promise<Use[]> {
  const byId = new Map(made.map((one) => [one.id, one]));
  const uses: Use[] = [];
  for (const ids of chunks([...byId.keys()])) {
    const rows: { target: string; childId?: string }[] = await db(child).whereIn(columnName, ids).select(`${columnName} as target`, ...(await hasId(db, child) ? ['id as childId'] : []));
    for (const { target, childId } of rows) {
      const one = byId.get(target);
      if (one && !own.has(`${child}:${childId}`)) uses.push({ ...one, by: child });
    }
  }
  return uses;
}

async function hasId(db: Db, table: string): Promise<boolean> {
  const rows: unknown[] = await db.raw("SELECT 1 FROM pragma_table_info(?) WHERE name = 'id'", [table]);
  return rows.length > 0;
}

/** Takes back everything, the last first. Foreign keys still refuse whatever was overlooked. */
export async function unmake(trx: Trx, batchId: string, made: readonly Made[]): Promise<void> {
  for (const { table, id } of [...made].reverse()) {
    for (const [child, column] of HANGING[table] ?? []) await trx(child).where(column, id).delete();
    await trx(table).where({ id }).delete();
  }
  await trx('import_made').where({ batchId }).delete();
}
