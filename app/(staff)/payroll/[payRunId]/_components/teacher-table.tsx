import Link from 'next/link';
import { Chip } from '@/components/ui/chip';
import { Sheet } from '@/components/ui/sheet';
import { EmptyState } from '@/components/ui/states';
import { say } from '@/lib/explained';
import { plural } from '@/lib/format';
import type { PayRunScreen } from '@/lib/payroll/server/pay-run-screen';
import type { PayTotals } from '@/lib/payroll/pay-totals';

const HEADERS = ['Lessons', 'Hours', 'Teaching', 'Other work', 'Corrections', 'Gross'] as const;

/** A row per teacher as on a pay list, their answer beside the sum. */
export function TeacherTable({ run, locale }: { run: PayRunScreen; locale: string }) {
  if (run.teachers.length === 0) return <Sheet><EmptyState title="Nothing to pay">No lesson of this period has begun, and no time is approved.</EmptyState></Sheet>;
  const words = { currency: run.currency, locale };
  return (
    <Sheet flush>
      <div className="overflow-x-auto">
        <table className="w-full border-collapse" aria-label="Pay by teacher">
          <thead className="max-md:sr-only">
            <tr className="border-b border-rule-strong text-[12.5px] text-ink-3">
              <th scope="col" className="px-3 py-[9px] text-left font-[650]">Teacher</th>
              {HEADERS.map((header) => <th key={header} scope="col" className="px-3 py-[9px] text-right font-[650]">{header}</th>)}
              <th scope="col" className="px-3 py-[9px] text-left font-[650]">Teacher says</th>
            </tr>
          </thead>
          <tbody className="max-md:block">
            {run.teachers.map((teacher) => (
              <tr key={teacher.engagementId} className="border-b border-rule max-md:block max-md:px-4 max-md:py-3">
                <th scope="row" className="px-3 py-[10px] text-left max-md:block max-md:p-0"><Link href={`/payroll/${run.payRunId}/${teacher.engagementId}`} className="font-semibold text-ink hover:text-petrol hover:underline tap">{teacher.name}</Link></th>
                <Figures totals={teacher} words={words} />
                <td className="px-3 py-[10px] max-md:mt-1 max-md:block max-md:p-0"><Chip tone={teacher.says.tone}>{teacher.says.words}</Chip></td>
              </tr>
            ))}
          </tbody>
          <tfoot className="max-md:block">
            <tr className="font-semibold max-md:block max-md:px-4 max-md:py-3">
              <th scope="row" className="px-3 py-[10px] text-left max-md:block max-md:p-0">{plural(run.teachers.length, 'teacher')}</th>
              <Figures totals={run.totals} words={words} />
              <td className="max-md:hidden" />
            </tr>
          </tfoot>
        </table>
      </div>
      {run.totals.reimbursementMinor > 0 ? <p className="border-t border-rule px-4 py-2 text-small text-ink-2">Reimbursements, apart from wages: {say(run.totals.reimbursementMinor, words)}</p> : null}
      {run.blocked ? <p className="flex flex-wrap items-center gap-[10px] border-t border-rule px-4 py-[14px] text-small"><Chip tone="bad">Cannot close yet</Chip>{run.blocked}</p> : null}
    </Sheet>
  );
}

function Figures({ totals, words }: { totals: PayTotals; words: { currency: string; locale: string } }) {
  const money = (minor: number) => (minor === 0 ? '—' : say(minor, words));
  const correction = totals.correctionMinor === 0 ? '—' : `${totals.correctionMinor > 0 ? '+' : '−'} ${say(Math.abs(totals.correctionMinor), words)}`;
  const cells = [totals.lessons, (Math.round(totals.minutes / 6) / 10).toFixed(1), money(totals.teachingMinor), money(totals.otherMinor), correction, <b key="gross">{say(totals.grossMinor, words)}</b>];
  return <>{cells.map((cell, index) => (
    <td key={HEADERS[index]} className={`num px-3 py-[10px] text-right max-md:justify-between max-md:p-0 max-md:py-[2px] ${cell === '—' ? 'max-md:hidden' : 'max-md:flex'}`}><span className="text-small font-normal text-ink-3 md:hidden">{HEADERS[index]}</span>{cell}</td>
  ))}</>;
}
