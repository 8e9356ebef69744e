import { mkdirSync, rmSync } from 'node:fs';
import { openDatabase } from '../../db/connection';
import { migrate } from '../../db/migrate';

/** Runs once per test run: every migration, from nothing, into a file that tests copy. */
export default async function setup({ provide }: { provide: (key: 'templateFile', value: string) => void }): Promise<() => void> {
  const folder = `var/test-${process.pid}`;
  mkdirSync(folder, { recursive: true });
  const file = `${folder}/template.db`;
  const db = openDatabase(file);
  await migrate(db);
  // Closing folds the write-ahead log back into the file, so that the file alone is whole and can be copied.
  await db.destroy();
  provide('templateFile', file);
  return () => rmSync(folder, { recursive: true, force: true });
}

declare module 'vitest' {
  export interface ProvidedContext { templateFile: string }
}
