import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import type { Trx } from '@/db/connection';
import { findTerm } from '@/db/terms';
import { transaction } from '@/db/transaction';
import { changeTuitionRun, hasReleasedRun, insertTuitionRun, itemTotals, openTuitionRun, replaceItems, type TuitionRunItem } from '@/db/tuition-runs';
import { AppError, notFound } from '@/lib/errors';
import { formatDate, plural } from '@/lib/format';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { addDays, addMonths, isLocalDate } from '@/lib/time';
import { assertCan } from '@/policies/ability';
import type { InstalmentPlan } from '../instalments';
import type { previewRunSchema } from '../schema';
import { groupBy, readBillingFacts, type BillingFacts, type BillingPeriod } from './billing-facts';
import { familyBillOf, type FamilyBill } from './family-bill';

type Preview = z.output<typeof previewRunSchema>;

/**
 * Works out the bill of every family for a term or a month and keeps it for looking at; nothing is sent and no number is
 * taken. Working it out again replaces the bills; families held by a person stay held.
 */
export async function previewTuitionRun(input: Preview, context: Context): Promise<{ runId: string }> {
  assertCan(context.ability, 'create', 'TuitionRun', {});
  const [period, termId] = await periodOf(input, context);
  if (input.dueOn < context.today) throw new AppError('invalid', 'The due date has passed.', { dueOn: ['Choose today or a later day.'] });
  const plan: InstalmentPlan = { count: input.instalments, firstDueOn: input.dueOn, depositBp: Math.round(input.depositPercent * 100), movesToWorkingDay: true };
  return transaction(context.db, async (trx) => {
    const runId = await openRun(trx, context, { input, period, termId, plan });
    const bills = await workOut(trx, context, period, plan);
    await replaceItems(trx, runId, bills.map((bill) => itemOf(runId, bill)));
    const totals = await itemTotals(trx, runId);
    const controlTotalMinor = totals.find(({ state }) => state === 'planned')?.totalMinor ?? 0;
    await changeTuitionRun(trx, runId, { controlTotalMinor, previewedAt: context.now });
    await recordAudit(trx, context, {
      action: 'preview', tableName: 'tuition_run', rowId: runId, after: { families: bills.length, controlTotalMinor },
      sentence: `Worked out the tuition run ${period.label} for ${plural(bills.length, 'family', 'families')}.`,
    });
    return { runId };
  });
}

async function periodOf({ kind, period }: Preview, { db, school }: Context): Promise<[BillingPeriod, string | null]> {
  if (kind === 'term') {
    const term = await findTerm(db, period);
    if (!term) throw notFound('term');
    return [{ kind, from: term.startsOn, to: term.endsOn, label: `${term.name} ${term.yearLabel}` }, term.id];
  }
  const from = `${period}-01`;
  if (!isLocalDate(from)) throw new AppError('invalid', 'This is not a month.', { period: ['Choose a month.'] });
  return [{ kind, from, to: addDays(addMonths(from, 1), -1), label: formatDate(from, school.locale, 'month') }, null];
}

type Opening = { input: Preview; period: BillingPeriod; termId: string | null; plan: InstalmentPlan };

async function openRun(trx: Trx, { actor, today }: Context, { input, period, termId, plan }: Opening): Promise<string> {
  const open = await openTuitionRun(trx, period.kind, period.from);
  if (open?.state === 'releasing') throw new AppError('conflict', 'This run is being released. Wait until it has finished.');
  const planJson = JSON.stringify(plan);
  if (open) {
    await changeTuitionRun(trx, open.id, { dueOn: input.dueOn, planJson, issuedOn: today });
    return open.id;
  }
  const isSupplement = await hasReleasedRun(trx, period.kind, period.from);
  const id = newId();
  await insertTuitionRun(trx, {
    id, label: isSupplement ? `${period.label}, later enrolments` : period.label, kind: period.kind, termId, periodFrom: period.from, periodTo: period.to,
    issuedOn: today, dueOn: input.dueOn, planJson, state: 'preview', createdBy: actor.personId,
  });
  return id;
}

async function workOut(trx: Trx, { school }: Context, period: BillingPeriod, plan: InstalmentPlan): Promise<FamilyBill[]> {
  const read = await readBillingFacts(trx, period, plan, school);
  const isLater = await hasReleasedRun(trx, period.kind, period.from);
  const facts = isLater ? { ...read, before: withoutBilled(read) } : read;
  const families = groupBy(facts.enrolments, ({ familyId }) => familyId);
  const bills = [...families].flatMap(([familyId, enrolments]) => familyBillOf(familyId, enrolments, facts) ?? []);
  if (isLater) return bills;
  const gone = [...facts.before].filter(([familyId]) => !bills.some((bill) => bill.familyId === familyId)).map(([familyId, lines]): FamilyBill => ({
    familyId, bill: null, problem: '', difference: { kind: 'gone', sentence: 'Nothing to charge any more' }, lastTotalMinor: lines.reduce((sum, { netMinor }) => sum + netMinor, 0),
  }));
  return [...bills, ...gone];
}

/** A later run of the same period is compared only by what it charges: what was billed before has not ended. */
function withoutBilled({ before, billed }: BillingFacts): BillingFacts['before'] {
  const isBilled = (familyId: string, id: string) => (billed.get(familyId) ?? []).some(({ enrolmentId }) => enrolmentId === id);
  const families = new Set([...before.keys(), ...billed.keys()]);
  return new Map([...families].map((familyId) => [familyId, (before.get(familyId) ?? []).filter(({ enrolmentId }) => !isBilled(familyId, enrolmentId))]));
}

function itemOf(runId: string, { familyId, bill, problem, difference, lastTotalMinor }: FamilyBill): Omit<TuitionRunItem, 'heldReason' | 'invoiceId'> {
  return {
    id: newId(), runId, familyId, state: problem ? 'problem' : bill ? 'planned' : 'gone', totalMinor: bill?.totalMinor ?? 0, lastTotalMinor,
    changeKind: difference.kind, changeText: difference.sentence, problem, billJson: JSON.stringify(bill ?? {}),
  };
}
