import type { Db, Trx } from './connection';

/**
 * One write, whole or not at all. Begins immediate (see immediate-client.ts), so that reading first and
 * then writing is safe beside a second process. Await nothing but the database inside: the whole school
 * waits meanwhile. Called inside a transaction it joins that one.
 */
export async function transaction<T>(db: Db, work: (trx: Trx) => Promise<T>): Promise<T> {
  if (db.isTransaction) return work(db as Trx);
  return db.transaction(work);
}
