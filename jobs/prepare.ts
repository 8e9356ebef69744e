import { mkdirSync } from 'node:fs';
import path from 'node:path';
import { migrate } from '@/db/migrate';
import { findSchool } from '@/db/school';
import { layDemoSchool } from '@/db/seeds/demo-school';
import { database } from '@/lib/server/database';
import { env } from '@/lib/server/env';

/** Brings the database to the newest schema and, for a new one without --empty, lays the demo school around today. */
async function main(): Promise<void> {
  mkdirSync(path.dirname(env().DATABASE_FILE), { recursive: true });
  const db = database();
  const ran = await migrate(db);
  if (ran.length > 0) console.info(`Prepared the database: ${ran.length} changes of the schema.`);
  const isNew = !(await findSchool(db));
  if (isNew && !process.argv.includes('--empty')) {
    console.info('Laying the demo school …');
    await layDemoSchool(db, Math.floor(Date.now() / 1000));
  }
  await db.destroy();
}

main().catch((error: unknown) => {
  console.error(error);
  process.exitCode = 1;
});
