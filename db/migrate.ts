import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import type { Knex } from 'knex';
import type Sqlite from 'better-sqlite3';

const FOLDER = path.join(process.cwd(), 'db', 'migrations');

/** Migrations are plain SQL files, hand-written, run in name order, each in one transaction. A merged one is never edited. */
class SqlFileSource implements Knex.MigrationSource<string> {
  async getMigrations(): Promise<string[]> {
    return readdirSync(FOLDER).filter((name) => name.endsWith('.sql')).sort();
  }

  getMigrationName(name: string): string {
    return name;
  }

  async getMigration(name: string): Promise<Knex.Migration> {
    const sql = readFileSync(path.join(FOLDER, name), 'utf8');
    return {
      up: async (trx) => {
        const client = trx.client as { acquireConnection(): Promise<Sqlite.Database> };
        const connection = await client.acquireConnection();
        connection.exec(sql);
      },
      down: () => Promise.reject(new Error('the school restores a backup instead of migrating down')),
    };
  }
}

/** Brings a database up to the newest schema; returns the names of the files that ran. */
export async function migrate(db: Knex): Promise<string[]> {
  const [, ran] = (await db.migrate.latest({ migrationSource: new SqlFileSource(), tableName: 'schema_migration' })) as [number, string[]];
  return ran;
}
