import 'server-only';
import { headers } from 'next/headers';
import type { Db } from '@/db/connection';
import type { EpochSeconds } from '@/lib/time';
import { database } from './database';

/** For operations that need nobody signed in: the moment, the database and where the request came from. */
export async function publicMoment(): Promise<{ db: Db; now: EpochSeconds; address: string }> {
  const forwarded = (await headers()).get('x-forwarded-for');
  return { db: database(), now: Math.floor(Date.now() / 1000), address: forwarded?.split(',')[0]?.trim() ?? 'direct' };
}
