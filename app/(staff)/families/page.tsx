import { Find } from '@/components/shell/find';
import { PageHeader } from '@/components/ui/page-header';
import { plural } from '@/lib/format';
import { readFamilies } from '@/lib/people/server/read-families';
import { requireContextTo } from '@/lib/server/context';
import { may } from '@/policies/ability';
import { FamilyTable } from './_components/family-table';

export const metadata = { title: 'Families' };

export default async function FamiliesPage() {
  const context = await requireContextTo('read', 'Family');
  const rows = await readFamilies(context);
  return (
    <>
      <PageHeader title="Families" sub={`${plural(rows.length, 'family', 'families')}: the accounts that are billed.`} actions={<Find />} />
      <FamilyTable rows={rows} mayExport={may(context.ability, 'export', 'Family')} />
    </>
  );
}
