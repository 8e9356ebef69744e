import knex, { type Knex } from 'knex';
import type Sqlite from 'better-sqlite3';
import { immediateClient } from './immediate-client';

/**
 * Either the pool or an open transaction. Every function in this folder takes one as its first
 * argument: SQLite has a single connection here, so a query that reached for the pool while a
 * transaction was open would wait for itself.
 */
export type Db = Knex | Knex.Transaction;
export type Trx = Knex.Transaction;

/** What every connection must have: read back by a test, because SQLite forgets three of the four on reopen. */
export const CONNECTION_PRAGMAS = {
  journal_mode: 'wal', synchronous: 2, foreign_keys: 1, busy_timeout: 5000,
} as const;

const toSnake = (name: string) => name.replace(/[A-Z]/g, (letter) => `_${letter.toLowerCase()}`);
const toCamel = (name: string) => name.replace(/_([a-z0-9])/g, (_match, letter: string) => letter.toUpperCase());

const camelNames = new Map<string, string>();
function camelOf(name: string): string {
  const known = camelNames.get(name) ?? toCamel(name);
  camelNames.set(name, known);
  return known;
}

function camelRow(row: unknown): unknown {
  if (typeof row !== 'object' || row === null || Buffer.isBuffer(row)) return row;
  return Object.fromEntries(Object.entries(row).map(([name, value]) => [camelOf(name), value]));
}

/** Opens a database file. Columns are snake_case in SQL and camelCase in TypeScript, converted here and nowhere else. */
export function openDatabase(filename: string): Knex {
  return knex({
    client: immediateClient,
    connection: { filename },
    useNullAsDefault: true,
    acquireConnectionTimeout: 2000,
    wrapIdentifier: (value, wrap) => wrap(toSnake(value)),
    postProcessResponse: (result: unknown) => (Array.isArray(result) ? result.map(camelRow) : camelRow(result)),
    pool: {
      min: 1,
      max: 1,
      afterCreate(connection: Sqlite.Database, done: (error: Error | null) => void) {
        for (const [name, value] of Object.entries(CONNECTION_PRAGMAS)) connection.pragma(`${name} = ${value}`);
        done(null);
      },
    },
  });
}
