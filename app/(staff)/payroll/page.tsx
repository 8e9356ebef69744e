import { PageHeader } from '@/components/ui/page-header';
import { payRunList } from '@/lib/payroll/server/pay-run-screen';
import { requireContextTo } from '@/lib/server/context';
import { BuildRun } from './_components/build-run';
import { RunTable } from './_components/run-table';

export const metadata = { title: 'Payroll' };

export default async function PayrollPage() {
  const context = await requireContextTo('read', 'PayRun');
  const { runs, today } = await payRunList(context);
  return (
    <>
      <PageHeader title="Payroll" sub="Pay is worked out from the marked lessons. Gross amounts only." actions={<BuildRun today={today} />} />
      <RunTable runs={runs} locale={context.school.locale} />
    </>
  );
}
