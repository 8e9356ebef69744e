import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import type { Trx } from '@/db/connection';
import { transaction } from '@/db/transaction';
import { changeTuitionRun, findItem, findTuitionRun, holdItem, itemTotals, type ItemWithFamily } from '@/db/tuition-runs';
import { AppError, notFound } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import { assertCan } from '@/policies/ability';
import type { holdFamilySchema, unholdFamilySchema } from '../schema';

/** Keeps one family's bill back, with the reason; the control total follows. */
export const holdFamily = (input: z.output<typeof holdFamilySchema>, context: Context): Promise<void> =>
  change(input, context, async (trx, item) => {
    if (item.state !== 'planned') throw new AppError('conflict', 'This bill cannot be held any more.', {});
    await holdItem(trx, item.id, { heldReason: input.reason, heldBy: context.actor.personId, heldAt: context.now });
    return `Held the bill of family ${item.familyName}: ${input.reason}`;
  });

export const unholdFamily = (input: z.output<typeof unholdFamilySchema>, context: Context): Promise<void> =>
  change(input, context, async (trx, item) => {
    if (item.state !== 'held') throw new AppError('conflict', 'This bill is not held.');
    await holdItem(trx, item.id, null);
    return `Let the bill of family ${item.familyName} go with the run.`;
  });

async function change({ runId, familyId }: { runId: string; familyId: string }, context: Context, work: (trx: Trx, item: ItemWithFamily) => Promise<string>): Promise<void> {
  assertCan(context.ability, 'update', 'TuitionRun', {});
  await transaction(context.db, async (trx) => {
    const [run, item] = [await findTuitionRun(trx, runId), await findItem(trx, runId, familyId)];
    if (!run || !item) throw notFound('bill');
    if (run.state !== 'preview') throw new AppError('conflict', 'This run is released already.');
    const sentence = await work(trx, item);
    const totals = await itemTotals(trx, runId);
    await changeTuitionRun(trx, runId, { controlTotalMinor: totals.find(({ state }) => state === 'planned')?.totalMinor ?? 0 });
    await recordAudit(trx, context, { action: 'hold', tableName: 'tuition_run_item', rowId: item.id, sentence });
  });
}
