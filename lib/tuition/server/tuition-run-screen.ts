import 'server-only';
import { allTerms } from '@/db/terms';
import { allTuitionRuns, findTuitionRun, itemsOfRun, itemTotals, type ItemState, type ItemWithFamily, type TuitionRun } from '@/db/tuition-runs';
import { payersOfFamilies } from '@/db/payers';
import { notFound } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import { addDays, type LocalDate } from '@/lib/time';
import { houseRulesOn } from '@/db/settings';
import { assertCan, may } from '@/policies/ability';
import type { Bill } from '../bill';
import { groupBy } from './billing-facts';

export type RunRow = { runId: string; label: string; state: TuitionRun['state']; dueOn: LocalDate; families: number; held: number; released: number; totalMinor: number };
export type RunList = { runs: RunRow[]; terms: { id: string; label: string; startsOn: LocalDate }[]; suggestedDueOn: LocalDate; today: LocalDate; currency: string; mayPreview: boolean };

export async function tuitionRunList(context: Context): Promise<RunList> {
  assertCan(context.ability, 'read', 'TuitionRun', {});
  const rules = await houseRulesOn(context.db, context.today);
  const runs = (await allTuitionRuns(context.db)).map(({ id, label, state, dueOn, familyCount, heldCount, releasedCount, controlTotalMinor }) =>
    ({ runId: id, label, state, dueOn, families: familyCount, held: heldCount, released: releasedCount, totalMinor: controlTotalMinor }));
  const terms = (await allTerms(context.db)).filter(({ endsOn }) => endsOn >= context.today).map(({ id, name, yearLabel, startsOn }) => ({ id, label: `${name} ${yearLabel}`, startsOn }));
  return { runs, terms, today: context.today, suggestedDueOn: addDays(context.today, rules['tuition.due_days']), currency: context.school.currency, mayPreview: may(context.ability, 'create', 'TuitionRun') };
}

export type RunBill = {
  familyId: string; familyName: string; state: ItemState; totalMinor: number; lastTotalMinor: number | null; changeKind: ItemWithFamily['changeKind']; changeText: string; problem: string; heldReason: string; invoiceId: string | null;
  lines: { text: string; amountMinor: number; steps: string[] }[]; shares: { payerName: string; amountMinor: number; sentences: string[]; dues: { dueOn: LocalDate; amountMinor: number }[] }[];
};
export type RunDetail = RunRow & { periodFrom: LocalDate; periodTo: LocalDate; bills: RunBill[]; mailCount: number; controlTotalMinor: number; lastTotalMinor: number; currency: string; mayRelease: boolean; mayExport: boolean; kind: 'term' | 'month'; period: string };

/** One run for looking at: what each family would get, beside the last time, and why. */
export async function tuitionRunDetail({ runId }: { runId: string }, context: Context): Promise<RunDetail> {
  assertCan(context.ability, 'read', 'TuitionRun', {});
  const run = await findTuitionRun(context.db, runId);
  if (!run) throw notFound('tuition run');
  const items = await itemsOfRun(context.db, runId);
  const names = new Map([...groupBy(await payersOfFamilies(context.db, items.map(({ familyId }) => familyId)), ({ id }) => id)].map(([id, [payer]]) => [id, payer?.name ?? '']));
  const bills = items.map((item) => billOf(item, names));
  const counted = new Map((await itemTotals(context.db, runId)).map((row) => [row.state, row]));
  const familiesIn = (...states: ItemState[]) => states.reduce((sum, state) => sum + (counted.get(state)?.families ?? 0), 0);
  const totalMinor = (counted.get('planned')?.totalMinor ?? 0) + (counted.get('released')?.totalMinor ?? 0);
  return {
    runId, label: run.label, state: run.state, dueOn: run.dueOn, kind: run.kind, period: run.termId ?? run.periodFrom.slice(0, 7), periodFrom: run.periodFrom, periodTo: run.periodTo, bills, currency: items[0]?.currency ?? context.school.currency,
    families: familiesIn('planned', 'released', 'held', 'problem'), held: familiesIn('held', 'problem'), released: familiesIn('released'), totalMinor, controlTotalMinor: run.controlTotalMinor,
    lastTotalMinor: items.reduce((sum, { lastTotalMinor }) => sum + (lastTotalMinor ?? 0), 0), mailCount: bills.filter(({ state }) => state === 'planned').reduce((sum, { shares }) => sum + shares.length, 0),
    mayRelease: may(context.ability, 'approve', 'TuitionRun'), mayExport: may(context.ability, 'export', 'TuitionRun'),
  };
}

function billOf(item: ItemWithFamily, names: Map<string, string>): RunBill {
  const bill = JSON.parse(item.billJson) as Partial<Bill>;
  const { familyId, familyName, state, totalMinor, lastTotalMinor, changeKind, changeText, problem, heldReason, invoiceId } = item;
  return {
    familyId, familyName, state, totalMinor, lastTotalMinor, changeKind, changeText, problem, heldReason, invoiceId,
    lines: (bill.lines ?? []).map(({ text, netMinor, taxMinor, explain }) => ({ text, amountMinor: netMinor + taxMinor, steps: explain })),
    shares: (bill.shares ?? []).map((share) => ({
      payerName: names.get(share.payerId) ?? '', amountMinor: share.amountMinor, sentences: share.parts.map(({ sentence }) => sentence.replace('your ', '')), dues: share.instalments.map(({ dueOn, amountMinor }) => ({ dueOn, amountMinor })),
    })),
  };
}
