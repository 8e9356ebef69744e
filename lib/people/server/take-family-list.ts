import 'server-only';
import type { TakenList } from '@/lib/exports/server/list-file';
import type { Context } from '@/lib/server/context';
import { assertCan } from '@/policies/ability';
import { readFamilies } from './read-families';

/** The families with the names of their students and payers, as their list shows them. */
export async function takeFamilyList(context: Context): Promise<TakenList> {
  assertCan(context.ability, 'export', 'Family', {});
  const rows = await readFamilies(context);
  return {
    name: 'families', tableName: 'family', rowId: 'families', columns: [{ header: 'Family', width: 28 }, { header: 'Students', width: 34 }, { header: 'Payers', width: 34 }],
    rows: rows.map(({ name, students, payers }) => [name, students, payers]),
  };
}
