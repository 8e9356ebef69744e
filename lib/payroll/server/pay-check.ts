import 'server-only';
import type { Trx } from '@/db/connection';
import { engagementsIn, type Engagement } from '@/db/pay-facts';
import { linesOfTeacher } from '@/db/pay-lines';
import { changePayRun, checksOf, findPayRun, queriesOf, type PayRunWithPeriod } from '@/db/pay-runs';
import { notFound } from '@/lib/errors';
import { mayMove, stateAfterAnswers } from '../pay-run-state';
import { payTotalsOf } from '../pay-totals';

/** A run and one of its teachers. The caller asserts who may see that teacher's pay. */
export async function runAndTeacher(trx: Trx, payRunId: string, engagementId: string): Promise<{ run: PayRunWithPeriod; teacher: Engagement }> {
  const run = await findPayRun(trx, payRunId);
  const teacher = run && (await engagementsIn(trx, { from: run.startsOn, to: run.endsOn })).find((engagement) => engagement.engagementId === engagementId);
  if (!run || !teacher) throw notFound('pay run');
  return { run, teacher };
}

/** States in which a teacher may agree or ask. */
export const isWithTeachers = ({ state }: Pick<PayRunWithPeriod, 'state'>): boolean => ['with_teachers', 'answering_queries', 'ready_to_approve'].includes(state);

export async function totalOf(trx: Trx, payRunId: string, engagementId: string): Promise<number> {
  const { grossMinor, reimbursementMinor } = payTotalsOf(await linesOfTeacher(trx, payRunId, engagementId));
  return grossMinor + reimbursementMinor;
}

export const hasOpenQuery = async (trx: Trx, payRunId: string, engagementId: string): Promise<boolean> =>
  (await queriesOf(trx, payRunId)).some((query) => query.engagementId === engagementId && query.state === 'open');

/** Counts the answers and moves the run on, or back while somebody still has to answer. */
export async function moveOn(trx: Trx, run: PayRunWithPeriod): Promise<void> {
  const open = (await queriesOf(trx, run.id)).filter(({ state }) => state === 'open').length;
  const state = stateAfterAnswers((await checksOf(trx, run.id)).map((check) => check.state), open);
  if (state !== run.state && mayMove(run.state, state)) await changePayRun(trx, run.id, { state });
}
