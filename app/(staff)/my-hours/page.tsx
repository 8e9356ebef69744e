import { AskedAndAnswered, PaySummary } from '@/components/payroll/pay-lines';
import { PageHeader } from '@/components/ui/page-header';
import { PrintButton } from '@/components/ui/print-button';
import { Sheet } from '@/components/ui/sheet';
import { EmptyState } from '@/components/ui/states';
import { formatDate } from '@/lib/format';
import { myHours } from '@/lib/payroll/server/teacher-pay';
import { requireContextTo } from '@/lib/server/context';
import { orNotFound } from '@/lib/server/or-not-found';
import { Agree } from './_components/agree';
import { OwnLines } from './_components/own-lines';
import { RunPicker } from './_components/run-picker';

export const metadata = { title: 'My hours' };

export default async function MyHoursPage({ searchParams }: { searchParams: Promise<{ run?: string }> }) {
  const context = await requireContextTo('read', 'PayLine');
  const { current, runs } = await orNotFound(myHours({ payRunId: (await searchParams).run }, context));
  if (!current) return <><PageHeader title="My hours" /><Sheet><EmptyState title="Nothing here yet">When the school builds the pay of a month, your lessons stand here line by line, each with its working.</EmptyState></Sheet></>;
  const words = { currency: current.currency, locale: context.school.locale };
  const answerBy = current.mayAnswer && current.answerByOn ? `Please agree or ask by ${formatDate(current.answerByOn, words.locale, 'day')}.` : current.statementNo ? `Pay statement ${current.statementNo}.` : 'Being prepared: figures may still change.';
  return (
    <>
      <PageHeader title="My hours" sub={`${current.label}. ${answerBy}`} actions={<><RunPicker runs={runs} current={current.payRunId} /><PrintButton /></>} />
      <div className="grid items-start gap-[18px] xl:grid-cols-[minmax(0,1fr)_320px]">
        <div className="flex min-w-0 flex-col gap-[18px] max-xl:order-2"><OwnLines pay={current} words={words} /><AskedAndAnswered pay={current} words={words} /></div>
        <div className="flex flex-col gap-[18px]"><PaySummary pay={current} words={words} /><Agree pay={current} words={words} /></div>
      </div>
    </>
  );
}
