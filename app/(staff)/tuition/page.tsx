import { PageHeader } from '@/components/ui/page-header';
import { requireContextTo } from '@/lib/server/context';
import { tuitionRunList } from '@/lib/tuition/server/tuition-run-screen';
import { NewRun } from './_components/new-run';
import { RunTable } from './_components/run-table';
import { TuitionSections } from './_components/tuition-sections';

export const metadata = { title: 'Tuition' };

export default async function TuitionPage() {
  const context = await requireContextTo('read', 'TuitionRun');
  const list = await tuitionRunList(context);
  return (
    <>
      <PageHeader title="Tuition" sub="Bills are worked out, looked at, and then released together." actions={list.mayPreview ? <NewRun list={list} /> : null} />
      <TuitionSections current="/tuition" />
      <RunTable runs={list.runs} words={{ currency: list.currency, locale: context.school.locale }} />
    </>
  );
}
