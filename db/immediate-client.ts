import type { Knex } from 'knex';
import SqliteClient from 'knex/lib/dialects/better-sqlite3/index.js';
import SqliteTransaction from 'knex/lib/dialects/sqlite3/execution/sqlite-transaction.js';

type Internals = { query(connection: unknown, sql: string): unknown };

/**
 * Knex opens SQLite transactions deferred: one that reads first and then writes fails at once with
 * SQLITE_BUSY_SNAPSHOT when another process has written in between, whatever the busy timeout. Ours take
 * the write lock at the start and wait for it, so every transaction here may read and then write.
 */
class ImmediateTransaction extends SqliteTransaction {
  override begin(connection: unknown): unknown {
    return (this as unknown as Internals).query(connection, 'BEGIN IMMEDIATE;');
  }
}

export class ImmediateSqliteClient extends SqliteClient {
  override transaction(...[container, config, outer]: unknown[]): unknown {
    return new ImmediateTransaction(this, container, config, outer);
  }
}

export const immediateClient = ImmediateSqliteClient as unknown as typeof Knex.Client;
