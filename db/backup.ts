import { existsSync, renameSync, rmSync } from 'node:fs';
import Sqlite from 'better-sqlite3';

/** Enough that a school is copied between two of its writes: a write by another process starts a copy over. */
const PAGES_PER_STEP = 10_000;
const SIDE_FILES = ['-wal', '-shm', '-journal'];

/**
 * Copies a database, also one in use, into one whole file without side files. The copy takes its name only when it has
 * been checked; what is wrong with it is thrown as a sentence and nothing is left behind.
 */
export async function copyChecked(fromFile: string, toFile: string): Promise<void> {
  const halfDone = `${toFile}.unchecked`;
  removeDatabase(halfDone);
  try {
    await copyPages(fromFile, halfDone);
    const [fault] = faultsOf(halfDone);
    if (fault !== undefined) throw new Error(fault);
    renameSync(halfDone, toFile);
  } finally {
    removeDatabase(halfDone);
  }
}

async function copyPages(fromFile: string, toFile: string): Promise<void> {
  const source = new Sqlite(fromFile, { readonly: true, fileMustExist: true });
  try {
    await source.backup(toFile, { progress: () => PAGES_PER_STEP });
  } finally {
    source.close();
  }
}

/** What is wrong with a database file, in words: broken pages, rows that point nowhere, or no school in it. */
function faultsOf(file: string): string[] {
  const database = new Sqlite(file, { fileMustExist: true });
  try {
    database.pragma('journal_mode = DELETE');
    const broken = (database.pragma('integrity_check(1)') as { integrity_check: string }[]).filter(({ integrity_check: answer }) => answer !== 'ok');
    if (broken.length > 0) return ['The file is damaged: its pages do not fit together.'];
    const astray = database.pragma('foreign_key_check') as { table: string }[];
    if (astray.length > 0) return [`The file is damaged: ${astray.length} rows point at rows that are not there, the first in “${astray[0]?.table ?? ''}”.`];
    const isSchool = database.prepare("SELECT 1 FROM sqlite_schema WHERE name = 'schema_migration'").get() !== undefined;
    return isSchool ? [] : ['There is no school in this file.'];
  } catch (error) {
    if (isDamage(error)) return ['The file is damaged, or it is not a database.'];
    throw error;
  } finally {
    database.close();
  }
}

/**
 * Folds the write-ahead log into the file, which only succeeds when no other process has it open. False when one has.
 * A file too damaged for that is left as it is: it is about to be replaced.
 */
export function closeForGood(file: string): boolean {
  const database = new Sqlite(file, { fileMustExist: true, timeout: 500 });
  try {
    return database.pragma('journal_mode = DELETE', { simple: true }) === 'delete';
  } catch (error) {
    if (isDamage(error)) return true;
    if (error instanceof Sqlite.SqliteError && error.code.startsWith('SQLITE_BUSY')) return false;
    throw error;
  } finally {
    database.close();
  }
}

/** Renames a database with whatever stands beside it. */
export function moveDatabase(fromFile: string, toFile: string): void {
  for (const part of ['', ...SIDE_FILES]) if (existsSync(fromFile + part)) renameSync(fromFile + part, toFile + part);
}

function removeDatabase(file: string): void {
  for (const part of ['', ...SIDE_FILES]) rmSync(file + part, { force: true });
}

export const isDamage = (error: unknown): boolean => error instanceof Sqlite.SqliteError && /^SQLITE_(NOTADB|CORRUPT)/.test(error.code);
