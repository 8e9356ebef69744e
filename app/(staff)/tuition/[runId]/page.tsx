import { PageHeader } from '@/components/ui/page-header';
import { formatDate, plural } from '@/lib/format';
import { requireContextTo } from '@/lib/server/context';
import { orNotFound } from '@/lib/server/or-not-found';
import { tuitionRunDetail } from '@/lib/tuition/server/tuition-run-screen';
import { RunChip } from '../_components/run-table';
import { ReleaseRun } from './_components/release-run';
import { RunBills } from './_components/run-bills';
import { RunFigures } from './_components/run-figures';

export const metadata = { title: 'Tuition run' };

export default async function TuitionRunPage({ params }: { params: Promise<{ runId: string }> }) {
  const context = await requireContextTo('read', 'TuitionRun');
  const run = await orNotFound(tuitionRunDetail(await params, context));
  const { locale } = context.school;
  const span = `${formatDate(run.periodFrom, locale, 'full')} to ${formatDate(run.periodTo, locale, 'full')}`;
  return (
    <>
      <PageHeader title={run.label} sub={<><RunChip state={run.state} /> <span className="ml-2">{span}, {plural(run.families, 'family', 'families')}, due {formatDate(run.dueOn, locale, 'short')}</span></>} actions={run.mayRelease ? <ReleaseRun run={run} locale={locale} /> : null} />
      <RunFigures run={run} locale={locale} />
      <RunBills run={run} locale={locale} />
    </>
  );
}
