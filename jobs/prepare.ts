import { existsSync, mkdirSync, renameSync, rmSync } from 'node:fs';
import path from 'node:path';
import { openDatabase } from '@/db/connection';
import { migrate } from '@/db/migrate';
import { layDemoSchool } from '@/db/seeds/demo-school';
import { env } from '@/lib/server/env';

const parts = ['', '-wal', '-shm'];

/** Brings a database that is there to the newest schema. */
async function bringUpToDate(file: string): Promise<void> {
  const db = openDatabase(file);
  const ran = await migrate(db);
  if (ran.length > 0) console.info(`Prepared the database: ${ran.length} changes of the schema.`);
  await db.destroy();
}

/** The demo school is laid in a file of its own that takes its name when it is whole: stopped half-way, nothing is left behind. */
async function layDemo(file: string): Promise<void> {
  console.info('Laying the demo school (half a minute) …');
  const laying = `${file}.laying`;
  for (const part of parts) rmSync(laying + part, { force: true });
  const db = openDatabase(laying);
  await migrate(db);
  await db.raw('PRAGMA synchronous = OFF');
  await layDemoSchool(db, Math.floor(Date.now() / 1000));
  // Closing folds the write-ahead log back into the file.
  await db.destroy();
  renameSync(laying, file);
}

async function main(): Promise<void> {
  const file = env().DATABASE_FILE;
  mkdirSync(path.dirname(file), { recursive: true });
  if (!existsSync(file) && !process.argv.includes('--empty')) await layDemo(file);
  await bringUpToDate(file);
}

main().catch((error: unknown) => {
  console.error(error);
  process.exitCode = 1;
});
