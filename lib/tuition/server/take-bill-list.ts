import 'server-only';
import type { ListColumn, TakenList } from '@/lib/exports/server/list-file';
import type { Context } from '@/lib/server/context';
import { assertCan } from '@/policies/ability';
import { BILL_WORDS, CHANGE_WORDS } from '../bill-words';
import { tuitionRunDetail, type RunBill } from './tuition-run-screen';

const COLUMNS: readonly ListColumn[] = [
  { header: 'Family', width: 28 }, { header: 'State', width: 18 }, { header: 'Beside last time', width: 18 }, { header: 'Currency', width: 10 },
  { header: 'Last tuition', isSummed: true }, { header: 'Now', isSummed: true }, { header: 'Held back', isSummed: true },
];
const isHeldBack = ({ state }: RunBill) => state === 'held' || state === 'problem';

/**
 * The bills of one tuition run. What is held back stands in a column of its own, so that the sum of the others is the sum of the
 * run. Why a bill is held, and which child or discount changed it, stays in the house.
 */
export async function takeBillList({ runId }: { runId: string }, context: Context): Promise<TakenList> {
  assertCan(context.ability, 'export', 'TuitionRun', {});
  const { bills, currency, label } = await tuitionRunDetail({ runId }, context);
  const amount = (amountMinor: number | null) => (amountMinor === null ? null : { amountMinor, currency });
  return {
    name: `bills of ${label}`, tableName: 'tuition_run', rowId: runId, columns: COLUMNS,
    rows: bills.map((bill) => [
      bill.familyName, BILL_WORDS[bill.state], CHANGE_WORDS[bill.changeKind], currency, amount(bill.lastTotalMinor), isHeldBack(bill) ? null : amount(bill.totalMinor), isHeldBack(bill) ? amount(bill.totalMinor) : null,
    ]),
  };
}
