import 'server-only';
import { findSchool, type School } from '@/db/school';
import { allSites } from '@/db/rooms';
import type { Db } from '@/db/connection';

export type PublicSchool = Pick<School, 'name' | 'publicPhone' | 'publicEmail' | 'isDemo'> & { sites: { id: string; name: string }[] };

/** What a stranger may know of the school; null before it is set up. */
export async function publicSchool({ db }: { db: Db }): Promise<PublicSchool | null> {
  const school = await findSchool(db);
  if (!school) return null;
  const { name, publicPhone, publicEmail, isDemo } = school;
  return { name, publicPhone, publicEmail, isDemo, sites: (await allSites(db)).map(({ id, name: siteName }) => ({ id, name: siteName })) };
}
