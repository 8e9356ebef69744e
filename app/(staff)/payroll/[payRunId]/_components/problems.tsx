import Link from 'next/link';
import { Sheet } from '@/components/ui/sheet';
import { formatDate, plural } from '@/lib/format';
import type { PayRunScreen, RunProblem } from '@/lib/payroll/server/pay-run-screen';

const SHOWN = 30;

/** The register holds the lessons of days that are over; today's are marked on the day itself. */
const hrefOf = ({ mendedBy, localDate }: RunProblem, today: string) => (mendedBy === 'rates' ? '/settings?tab=teachers' : localDate < today ? '/register' : '/today');

/** Lines that cannot be paid yet, each with what is missing. */
export function Problems({ run, locale }: { run: PayRunScreen; locale: string }) {
  if (run.problems.length === 0) return null;
  return (
    <Sheet id="problems" title={`${plural(run.problems.length, 'line')} to put right`} flush>
      <ul>
        {run.problems.slice(0, SHOWN).map((problem, index) => (
          <li key={index} className="grid gap-x-4 border-t border-rule px-4 py-2 md:grid-cols-[150px_1fr_1fr]">
            <span><b>{problem.name}</b></span>
            <span className="text-ink-2">{formatDate(problem.localDate, locale, 'short')}, {problem.text}</span>
            <Link href={hrefOf(problem, run.today)} className="text-brick underline underline-offset-2">{problem.problem}</Link>
          </li>
        ))}
      </ul>
      {run.problems.length > SHOWN ? <p className="border-t border-rule px-4 py-2 text-small text-ink-3">and {run.problems.length - SHOWN} more</p> : null}
      <p className="border-t border-rule px-4 py-3 text-small text-ink-2">Unmarked lessons are marked in the register; rates are set with the teachers. Then press “Work out again”.</p>
    </Sheet>
  );
}
