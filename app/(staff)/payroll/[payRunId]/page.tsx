import { RunStateChip } from '@/components/payroll/run-state-chip';
import { PageHeader } from '@/components/ui/page-header';
import { formatDate, plural } from '@/lib/format';
import { payRunScreen } from '@/lib/payroll/server/pay-run-screen';
import { requireContextTo } from '@/lib/server/context';
import { orNotFound } from '@/lib/server/or-not-found';
import { PayShare } from './_components/pay-share';
import { Problems } from './_components/problems';
import { Queries } from './_components/queries';
import { RunSteps } from './_components/run-steps';
import { TeacherTable } from './_components/teacher-table';

export const metadata = { title: 'Pay run' };

export default async function PayRunPage({ params }: { params: Promise<{ payRunId: string }> }) {
  const context = await requireContextTo('read', 'PayRun');
  const run = await orNotFound(payRunScreen(await params, context));
  const { locale } = context.school;
  const sub = <>{run.kindWords}, {formatDate(run.startsOn, locale)} – {formatDate(run.endsOn, locale, 'full')}. Built from {plural(run.totals.lessons, 'paid lesson')}. <RunStateChip state={run.state} /></>;
  return (
    <>
      <PageHeader title={`${formatDate(run.startsOn, locale, 'month')} pay`} sub={sub} actions={<RunSteps run={run} locale={locale} />} />
      <div className="grid items-start gap-[18px] xl:grid-cols-[minmax(0,1fr)_292px]">
        <div className="flex min-w-0 flex-col gap-[18px]">
          <TeacherTable run={run} locale={locale} />
          <Queries run={run} locale={locale} />
          <Problems run={run} locale={locale} />
        </div>
        <PayShare months={run.months} currency={run.currency} locale={locale} />
      </div>
    </>
  );
}
