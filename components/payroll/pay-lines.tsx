import type { ReactNode } from 'react';
import { say, type MoneyWords } from '@/lib/explained';
import { formatDate } from '@/lib/format';
import { hoursText } from '@/lib/payroll/pay-lines';
import type { LineView, TeacherPay } from '@/lib/payroll/server/teacher-pay';
import { clockOf } from '@/lib/time';
import { Chip } from '../ui/chip';
import { Sheet } from '../ui/sheet';
import { EmptyState } from '../ui/states';
import { Working } from '../ui/working';

/** Every line of one teacher's pay; each amount opens to the sentence behind it. `aside` stands at the end of a line. */
export function PayLines({ pay, words, aside }: { pay: TeacherPay; words: MoneyWords; aside?: (line: LineView) => ReactNode }) {
  if (pay.lines.length === 0) return <Sheet><EmptyState title="No lines">No lesson of this period has begun yet.</EmptyState></Sheet>;
  return (
    <Sheet eyebrow="Every line" flush>
      <ul>
        {pay.lines.map((line) => (
          <li key={line.lineId} className="grid grid-cols-[minmax(0,1fr)_auto] items-start gap-x-3 gap-y-1 border-t border-rule px-4 py-[10px] md:grid-cols-[124px_minmax(0,1fr)_70px_minmax(110px,auto)_auto]">
            <span className="num text-small text-ink-3 max-md:col-span-2">{formatDate(line.localDate, words.locale, 'short')}{line.startMin === null ? '' : ` ${clockOf(line.startMin)}`}</span>
            <span className="min-w-0">{line.text}{line.problem ? <span className="block text-small text-brick">{line.problem}</span> : null}</span>
            <span className="num text-right text-small text-ink-3 max-md:hidden">{line.minutes > 0 ? hoursText(line.minutes) : '—'}</span>
            <span className="num text-right"><Working figure={<b>{say(line.amountMinor, words)}</b>} steps={line.steps} align="right" /></span>
            <span className="max-md:col-span-2 max-md:justify-self-start">{line.isAsked ? <Chip tone="wait">asked</Chip> : aside?.(line)}</span>
          </li>
        ))}
      </ul>
    </Sheet>
  );
}

/** The sum in a few figures, and equal lessons on one row each. */
export function PaySummary({ pay, words }: { pay: TeacherPay; words: MoneyWords }) {
  const { totals } = pay;
  const rows = [['Teaching', totals.teachingMinor], ['Other work', totals.otherMinor], ['Corrections', totals.correctionMinor], ['Reimbursed, apart from wages', totals.reimbursementMinor]] as const;
  return (
    <Sheet eyebrow="Gross, before tax">
      <p className="num font-display text-[34px] font-semibold leading-tight">{say(totals.grossMinor, words)}</p>
      <p className="text-small text-ink-3">{hoursText(totals.minutes)} paid, {totals.lessons} lessons</p>
      <dl className="mt-3 grid grid-cols-[1fr_auto] gap-x-4 gap-y-1">
        {rows.filter(([, minor]) => minor !== 0).map(([label, minor]) => <div key={label} className="contents"><dt className="text-ink-2">{label}</dt><dd className="num text-right">{say(minor, words)}</dd></div>)}
      </dl>
      {pay.summary.length > 0 ? <ul className="num mt-3 border-t border-rule pt-2 text-small text-ink-2">{pay.summary.map(({ sentence }) => <li key={sentence}>{sentence}</li>)}</ul> : null}
    </Sheet>
  );
}

/** What was asked, and what was answered. */
export function AskedAndAnswered({ pay, words }: { pay: TeacherPay; words: MoneyWords }) {
  if (pay.queries.length === 0) return null;
  return (
    <Sheet eyebrow="Asked and answered" flush>
      <ul>
        {pay.queries.map((query) => (
          <li key={query.queryId} className="border-t border-rule px-4 py-3">
            <p>{formatDate(query.aboutOn, words.locale, 'short')}, {query.aboutText}: “{query.text}”</p>
            {query.state === 'open' ? <p className="mt-1"><Chip tone="wait">waits for an answer</Chip></p> : (
              <p className="mt-1 text-ink-2"><Chip tone={query.state === 'accepted' ? 'ok' : 'neutral'}>{query.state}</Chip> {query.answer}{query.amountChangeMinor !== 0 ? ` (${say(query.amountChangeMinor, words)})` : ''}</p>
            )}
          </li>
        ))}
      </ul>
    </Sheet>
  );
}
