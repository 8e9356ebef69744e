import type { PayRunScreen } from '@/lib/payroll/server/pay-run-screen';

export type NextStep = { kind: 'send' | 'approve' | 'close'; /** Why it cannot be taken yet. */ why: string | null };

/** The one step that comes next in the life of a pay run, or null when nothing is left to do. */
export function nextStepOf(run: PayRunScreen): NextStep | null {
  switch (run.state) {
    case 'open':
    case 'gathering': return { kind: 'send', why: whyNotSend(run) };
    case 'with_teachers': return { kind: 'approve', why: 'Not every teacher has agreed.' };
    case 'answering_queries': return { kind: 'approve', why: 'A question waits for its answer.' };
    case 'ready_to_approve': return { kind: 'approve', why: null };
    case 'approved': return { kind: 'close', why: null };
    case 'closed':
    case 'exported': return null;
  }
}

function whyNotSend({ problems, isOver, teachers }: PayRunScreen): string | null {
  if (teachers.length === 0) return 'There is nothing to pay.';
  if (problems.length > 0) return 'Some lines have to be put right first.';
  return isOver ? null : 'The period is still running.';
}
