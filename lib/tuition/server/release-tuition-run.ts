import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import type { Trx } from '@/db/connection';
import { transaction } from '@/db/transaction';
import { changeTuitionRun, findItem, findTuitionRun, itemTotals, plannedItemIds, type TuitionRun } from '@/db/tuition-runs';
import { AppError, notFound } from '@/lib/errors';
import { formatMoney, plural } from '@/lib/format';
import type { Context } from '@/lib/server/context';
import { assertCan } from '@/policies/ability';
import type { releaseRunSchema } from '../schema';
import { issueFamilyInvoice } from './issue-family-invoice';

export type Progress = { done: number; total: number };
export type Released = { runId: string; invoices: number; totalMinor: number };

/**
 * Issues the bills that were looked at: number, invoice, shares, books and one mail per payer, each family in one transaction.
 * Stopped half-way it goes on where it was; asked twice it does nothing the second time, because a family is released once.
 */
export async function releaseTuitionRun(input: z.output<typeof releaseRunSchema>, context: Context, onProgress: (progress: Progress) => Promise<void> | void = () => undefined): Promise<Released> {
  assertCan(context.ability, 'approve', 'TuitionRun', {});
  const run = await transaction(context.db, (trx) => beginRelease(trx, context, input));
  const waiting = await plannedItemIds(context.db, run.id);
  const already = (await releasedTotals(context, run.id)).invoices;
  for (const [index, familyId] of waiting.entries()) {
    await transaction(context.db, (trx) => releaseFamily(trx, context, run, familyId));
    await onProgress({ done: already + index + 1, total: already + waiting.length });
  }
  await transaction(context.db, (trx) => finishRelease(trx, context, run.id));
  return releasedTotals(context, run.id);
}

async function beginRelease(trx: Trx, context: Context, { runId, controlTotalMinor }: z.output<typeof releaseRunSchema>): Promise<TuitionRun> {
  const run = await findTuitionRun(trx, runId);
  if (!run) throw notFound('tuition run');
  if (run.state === 'dropped') throw new AppError('conflict', 'This run was dropped.');
  if (run.state !== 'preview') return run;
  if (run.controlTotalMinor !== controlTotalMinor) throw new AppError('conflict', 'The bills have changed since you looked at them. Look again before you release.');
  if (run.dueOn < context.today) throw new AppError('conflict', 'The due date has passed. Work the bills out again with a later one.');
  await changeTuitionRun(trx, runId, { state: 'releasing' });
  return { ...run, state: 'releasing' };
}

async function releaseFamily(trx: Trx, context: Context, run: TuitionRun, familyId: string): Promise<void> {
  const item = await findItem(trx, run.id, familyId);
  if (item?.state === 'planned') await issueFamilyInvoice(trx, context, run, item);
}

async function finishRelease(trx: Trx, context: Context, runId: string): Promise<void> {
  const run = await findTuitionRun(trx, runId);
  if (run?.state !== 'releasing') return;
  const { invoices, totalMinor } = await releasedTotals({ ...context, db: trx }, runId);
  await changeTuitionRun(trx, runId, { state: 'released', releasedAt: context.now, releasedBy: context.actor.personId });
  await recordAudit(trx, context, {
    action: 'release', tableName: 'tuition_run', rowId: runId, after: { invoices, totalMinor },
    sentence: `Released the tuition run ${run.label}: ${plural(invoices, 'invoice')}, ${formatMoney({ amountMinor: totalMinor, currency: context.school.currency }, context.school.locale)}.`,
  });
}

async function releasedTotals({ db }: Pick<Context, 'db'>, runId: string): Promise<Released> {
  const released = (await itemTotals(db, runId)).find(({ state }) => state === 'released');
  return { runId, invoices: released?.families ?? 0, totalMinor: released?.totalMinor ?? 0 };
}
