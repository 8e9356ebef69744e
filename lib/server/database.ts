import 'server-only';
import { openDatabase } from '@/db/connection';
import { env } from './env';

type Database = ReturnType<typeof openDatabase>;

const holder = globalThis as typeof globalThis & { rungwellDatabase?: Database };

/** The school's database, opened once per process (also across reloads in development). */
export function database(): Database {
  holder.rungwellDatabase ??= openDatabase(env().DATABASE_FILE);
  return holder.rungwellDatabase;
}
