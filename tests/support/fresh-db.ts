import { randomUUID } from 'node:crypto';
import { copyFileSync, rmSync } from 'node:fs';
import path from 'node:path';
import type { Knex } from 'knex';
import { inject, onTestFinished } from 'vitest';
import { openDatabase } from '../../db/connection';

/** A migrated, empty database of this test's own. */
export function freshDb(): Knex {
  const template = inject('templateFile');
  const filename = path.join(path.dirname(template), `${randomUUID()}.db`);
  copyFileSync(template, filename);
  const db = openDatabase(filename);
  onTestFinished(async () => {
    await db.destroy();
    for (const suffix of ['', '-wal', '-shm']) rmSync(filename + suffix, { force: true });
  });
  return db;
}
