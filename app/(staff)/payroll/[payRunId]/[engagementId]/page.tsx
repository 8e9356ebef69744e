import { AskedAndAnswered, PayLines, PaySummary } from '@/components/payroll/pay-lines';
import { RunStateChip } from '@/components/payroll/run-state-chip';
import { ButtonLink } from '@/components/ui/button';
import { PageHeader } from '@/components/ui/page-header';
import { PrintButton } from '@/components/ui/print-button';
import { CHECK_WORDS } from '@/lib/payroll/pay-run-state';
import { teacherPay } from '@/lib/payroll/server/teacher-pay';
import { requireContextTo } from '@/lib/server/context';
import { orNotFound } from '@/lib/server/or-not-found';
import { PassOver } from '../_components/pass-over';

export const metadata = { title: 'Pay of a teacher' };

export default async function TeacherPayPage({ params }: { params: Promise<{ payRunId: string; engagementId: string }> }) {
  const context = await requireContextTo('read', 'PayRun');
  const pay = await orNotFound(teacherPay(await params, context));
  const words = { currency: pay.currency, locale: context.school.locale };
  const check = pay.check ? `, ${CHECK_WORDS[pay.check]}` : '';
  return (
    <>
      <PageHeader title={pay.name} sub={<>{pay.label}{pay.statementNo ? `, pay statement ${pay.statementNo}` : check} <RunStateChip state={pay.state} /></>}
        actions={<><ButtonLink href={`/payroll/${pay.payRunId}`} kind="quiet">The whole run</ButtonLink><PrintButton label={pay.statementNo ? 'Print the statement' : 'Print'} />{pay.isPassable ? <PassOver payRunId={pay.payRunId} engagementId={pay.engagementId} name={pay.name} /> : null}</>} />
      <div className="grid items-start gap-[18px] xl:grid-cols-[minmax(0,1fr)_320px]">
        <div className="flex min-w-0 flex-col gap-[18px] max-xl:order-2"><PayLines pay={pay} words={words} /><AskedAndAnswered pay={pay} words={words} /></div>
        <PaySummary pay={pay} words={words} />
      </div>
    </>
  );
}
