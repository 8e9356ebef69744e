import 'server-only';
import { findFamily } from '@/db/families';
import { listFamilies, payersOfFamily, studentsOfFamily, type FamilyListRow } from '@/db/student-lists';
import type { Context } from '@/lib/server/context';
import { assertCan } from '@/policies/ability';

export async function readFamilies({ db, ability }: Context): Promise<FamilyListRow[]> {
  assertCan(ability, 'read', 'Family', {});
  return listFamilies(db);
}

export async function readFamily({ id }: { id: string }, { db, ability }: Context) {
  assertCan(ability, 'read', 'Family', { id });
  const family = await findFamily(db, id);
  return family ? { ...family, payers: await payersOfFamily(db, id), students: await studentsOfFamily(db, id) } : null;
}
