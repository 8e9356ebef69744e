import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import type { Trx } from '@/db/connection';
import { engagementsIn } from '@/db/pay-facts';
import { replaceLines } from '@/db/pay-lines';
import { changePayRun, checksOf, ensurePayPeriod, findPayRun, insertPayRun, queriesOf, runOfPeriod, setCheck, type PayRunWithPeriod } from '@/db/pay-runs';
import { transaction } from '@/db/transaction';
import { AppError, notFound } from '@/lib/errors';
import { formatDate, plural } from '@/lib/format';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { addDays, addMonths } from '@/lib/time';
import { assertCan } from '@/policies/ability';
import type { PayLine } from '../pay-lines';
import { assertMove, stateAfterAnswers } from '../pay-run-state';
import { payTotalsOf } from '../pay-totals';
import type { buildRunSchema, payRunSchema } from '../schema';
import { workOutPay } from './work-out-pay';

const KIND_WORDS = { employee: 'employees', contractor: 'contractors' } as const;

/** Opens the pay runs of a month, one for employees and one for contractors of each legal entity, and works them out. */
export async function buildPayRuns({ month }: z.output<typeof buildRunSchema>, context: Context): Promise<{ payRunIds: string[] }> {
  assertCan(context.ability, 'create', 'PayRun', {});
  const from = `${month}-01`;
  if (from > context.today) throw new AppError('invalid', 'This month has not begun.', { month: ['Choose this month or an earlier one.'] });
  const to = addDays(addMonths(from, 1), -1);
  return transaction(context.db, async (trx) => {
    const engagements = await engagementsIn(trx, { from, to });
    if (engagements.length === 0) throw new AppError('invalid', 'Nobody was engaged in this month.', { month: ['Choose another month.'] });
    const groups = new Map(engagements.map(({ legalEntityId, kind }) => [`${legalEntityId} ${kind}`, { legalEntityId, engagementKind: kind }]));
    const payRunIds: string[] = [];
    for (const { legalEntityId, engagementKind } of groups.values()) {
      const label = `${formatDate(from, context.school.locale, 'month')}, ${KIND_WORDS[engagementKind]}`;
      const period = await ensurePayPeriod(trx, { id: newId(), legalEntityId, engagementKind, label, startsOn: from, endsOn: to, payOn: null });
      payRunIds.push(await openAndGather(trx, context, period.id));
    }
    return { payRunIds };
  });
}

async function openAndGather(trx: Trx, context: Context, payPeriodId: string): Promise<string> {
  const known = await runOfPeriod(trx, payPeriodId);
  const id = known?.id ?? newId();
  if (!known) await insertPayRun(trx, { id, payPeriodId, createdBy: context.actor.personId });
  const run = await findPayRun(trx, id);
  if (run && !['approved', 'closed', 'exported'].includes(run.state)) await gather(trx, context, run);
  return id;
}

/** Works a run out again from what is marked now. Teachers whose sum is the same stay agreed; the others are asked again. */
export async function gatherPayRun({ payRunId }: z.output<typeof payRunSchema>, context: Context): Promise<void> {
  assertCan(context.ability, 'update', 'PayRun', { id: payRunId });
  await transaction(context.db, async (trx) => {
    const run = await findPayRun(trx, payRunId);
    if (!run) throw notFound('pay run');
    assertMove(run.state, 'gathering');
    await gather(trx, context, run);
  });
}

async function gather(trx: Trx, context: Context, run: PayRunWithPeriod): Promise<void> {
  const lines = await workOutPay(trx, run, { now: context.now, words: { currency: run.currency, locale: context.school.locale } });
  await replaceLines(trx, run.id, lines, newId);
  await changePayRun(trx, run.id, { state: await stateOf(trx, run, lines), gatheredAt: context.now });
  await recordAudit(trx, context, { action: 'gather', tableName: 'pay_run', rowId: run.id, sentence: `Worked out ${run.label}: ${plural(lines.length, 'line')}.` });
}

/** Where a run stands after it was worked out again: what has changed must be looked at again, by those it concerns. */
async function stateOf(trx: Trx, run: PayRunWithPeriod, lines: readonly PayLine[]): Promise<'gathering' | 'with_teachers' | 'answering_queries' | 'ready_to_approve'> {
  const [checks, queries] = [await checksOf(trx, run.id), await queriesOf(trx, run.id)];
  if (checks.length === 0) return 'gathering';
  for (const check of checks) {
    const totals = payTotalsOf(lines.filter(({ engagementId }) => engagementId === check.engagementId));
    const putRight = queries.filter(({ engagementId, state }) => engagementId === check.engagementId && state === 'accepted').reduce((sum, { amountChangeMinor }) => sum + amountChangeMinor, 0);
    const totalMinor = totals.grossMinor + totals.reimbursementMinor + putRight;
    if (totalMinor !== check.totalMinor && check.state !== 'queried') await setCheck(trx, { ...check, state: 'waiting', totalMinor, at: null, reason: '' });
  }
  if (lines.some(({ problem }) => problem !== '')) return 'gathering';
  return stateAfterAnswers((await checksOf(trx, run.id)).map(({ state }) => state), queries.filter(({ state }) => state === 'open').length);
}
