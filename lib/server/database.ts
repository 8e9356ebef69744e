import 'server-only';
import type { Knex } from 'knex';
import { openDatabase } from '@/db/connection';
import { env } from './env';

const holder = globalThis as typeof globalThis & { rungwellDatabase?: Knex };

/** The school's database, opened once per process (also across reloads in development). */
export function database(): Knex {
  holder.rungwellDatabase ??= openDatabase(env().DATABASE_FILE);
  return holder.rungwellDatabase;
}
