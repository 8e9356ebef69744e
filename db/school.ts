import type { Db, Trx } from './connection';

export type School = {
  name: string; locale: string; zone: string; currency: string; weekStart: number; publicEmail: string | null; publicPhone: string | null;
  chordStyle: 'words' | 'signs'; safeguardingContact: string | null; isDemo: boolean;
};
type SchoolRow = Omit<School, 'isDemo'> & { id: number; isDemo: number; createdAt: number };

/** The school, or undefined before the first-run set-up. */
export async function findSchool(db: Db): Promise<School | undefined> {
  const row = await db<SchoolRow>('school').first();
  if (!row) return undefined;
  const { id: _id, createdAt: _createdAt, isDemo, ...school } = row;
  return { ...school, isDemo: isDemo === 1 };
}

export async function insertSchool(trx: Trx, school: Pick<School, 'name' | 'locale' | 'zone' | 'currency'> & Partial<School>): Promise<void> {
  const { isDemo = false, ...rest } = school;
  await trx('school').insert({ id: 1, ...rest, isDemo: isDemo ? 1 : 0 });
}
