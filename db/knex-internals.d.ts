/** The two classes of Knex that `immediate-client.ts` extends; the package ships no types for them. */
declare module 'knex/lib/dialects/better-sqlite3/index.js' {
  export default class SqliteClient {
    constructor(config: unknown);
    transaction(...args: unknown[]): unknown;
  }
}

declare module 'knex/lib/dialects/sqlite3/execution/sqlite-transaction.js' {
  export default class SqliteTransaction {
    constructor(...args: unknown[]);
    begin(connection: unknown): unknown;
  }
}
