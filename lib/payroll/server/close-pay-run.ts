import 'server-only';
import { createHash } from 'node:crypto';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import type { Trx } from '@/db/connection';
import { postJournal } from '@/db/journal';
import { takeNumber } from '@/db/number-series';
import { engagementsIn, type Engagement } from '@/db/pay-facts';
import { linesOfRun, type StoredPayLine } from '@/db/pay-lines';
import { changePayRun, checksOf, findPayRun, insertStatement, lockOccurrences, queriesOf, setCheck, type PayRunWithPeriod } from '@/db/pay-runs';
import { transaction } from '@/db/transaction';
import { say } from '@/lib/explained';
import { AppError, notFound } from '@/lib/errors';
import { formatDate, plural } from '@/lib/format';
import { queueMail } from '@/lib/messages/server/queue-mail';
import type { Context } from '@/lib/server/context';
import { env } from '@/lib/server/env';
import { newId } from '@/lib/server/ids';
import { assertCan, type Action } from '@/policies/ability';
import { assertMove, type PayRunState } from '../pay-run-state';
import { payTotalsOf } from '../pay-totals';
import type { payRunSchema, sendForCheckSchema } from '../schema';

type RunInput = z.output<typeof payRunSchema>;
type Work = (trx: Trx, run: PayRunWithPeriod, lines: StoredPayLine[]) => Promise<string>;

/** One step of a run's life: who may, whether it may be taken now, the work, and the audit sentence. */
async function step(input: RunInput, context: Context, to: { state: PayRunState; may: Action }, work: Work): Promise<void> {
  assertCan(context.ability, to.may, 'PayRun', { id: input.payRunId });
  await transaction(context.db, async (trx) => {
    const run = await findPayRun(trx, input.payRunId);
    if (!run) throw notFound('pay run');
    assertMove(run.state, to.state);
    const sentence = await work(trx, run, await linesOfRun(trx, run.id));
    await recordAudit(trx, context, { action: to.state, tableName: 'pay_run', rowId: run.id, sentence });
  });
}

const byTeacher = (lines: readonly StoredPayLine[]): Map<string, StoredPayLine[]> => {
  const groups = new Map<string, StoredPayLine[]>();
  for (const line of lines) groups.set(line.engagementId, [...(groups.get(line.engagementId) ?? []), line]);
  return groups;
};

/** Asks each teacher to look at their own lines. Not while a lesson is unmarked or a rate is missing. */
export const sendForCheck = (input: z.output<typeof sendForCheckSchema>, context: Context): Promise<void> =>
  step(input, context, { state: 'with_teachers', may: 'update' }, async (trx, run, lines) => {
    assertSendable(run, lines, context, input.answerByOn);
    const engagements = await engagementsIn(trx, { from: run.startsOn, to: run.endsOn });
    for (const [engagementId, own] of byTeacher(lines)) {
      const { grossMinor, reimbursementMinor } = payTotalsOf(own);
      await setCheck(trx, { payRunId: run.id, engagementId, state: 'waiting', totalMinor: grossMinor + reimbursementMinor, reason: '', at: null });
      await mailCheck(trx, context, { run, teacher: engagements.find((engagement) => engagement.engagementId === engagementId), answerByOn: input.answerByOn });
    }
    await changePayRun(trx, run.id, { state: 'with_teachers', answerByOn: input.answerByOn });
    return `Sent ${run.label} to ${plural(byTeacher(lines).size, 'teacher')} for checking.`;
  });

function assertSendable(run: PayRunWithPeriod, lines: readonly StoredPayLine[], { today, school }: Context, answerByOn: string): void {
  const problems = lines.filter(({ problem }) => problem !== '').length;
  if (problems > 0) throw new AppError('conflict', `${plural(problems, 'line')} cannot be paid yet. Put them right first.`);
  if (lines.length === 0) throw new AppError('conflict', 'There is nothing to pay in this run.');
  if (today <= run.endsOn) throw new AppError('conflict', `The period ends on ${formatDate(run.endsOn, school.locale)}. Send it for checking after that.`);
  if (answerByOn < today) throw new AppError('invalid', 'This day has passed.', { answerByOn: ['Choose today or a later day.'] });
}

async function mailCheck(trx: Trx, context: Context, { run, teacher, answerByOn }: { run: PayRunWithPeriod; teacher: Engagement | undefined; answerByOn: string }): Promise<void> {
  if (!teacher) return;
  await queueMail(trx, context, { personId: teacher.personId }, {
    topic: 'pay_check', key: `pay_check:${run.id}:${teacher.engagementId}:${answerByOn}`, subjectRef: run.id, subject: `Please check your hours, ${run.label}`,
    lines: [`Your hours for ${run.label} are ready. Every line says how it was worked out.`, `Please agree or ask about a line by ${formatDate(answerByOn, context.school.locale, 'day')}.`],
    link: { label: 'Open my hours', url: `${env().NEXTAUTH_URL}/my-hours` },
  });
}

/** The owner approves what the teachers have agreed to. */
export const approvePayRun = (input: RunInput, context: Context): Promise<void> =>
  step(input, context, { state: 'approved', may: 'approve' }, async (trx, run, lines) => {
    if ((await queriesOf(trx, run.id)).some(({ state }) => state === 'open')) throw new AppError('conflict', 'A question is open. Answer it first.');
    if ((await checksOf(trx, run.id)).some(({ state }) => state === 'waiting' || state === 'queried')) throw new AppError('conflict', 'Not every teacher has agreed.');
    if (lines.some(({ problem }) => problem !== '')) throw new AppError('conflict', 'A line cannot be paid yet. Put it right first.');
    await changePayRun(trx, run.id, { state: 'approved', approvedBy: context.actor.personId, approvedAt: context.now });
    return `Approved ${run.label}.`;
  });

/** Same lines, same hash: what was paid can be proved later. */
function snapshotHash(lines: readonly StoredPayLine[]): string {
  const rows = lines.map(({ engagementId, lineKey, kind, localDate, minutes, rateMinor, shareBp, amountMinor }) => JSON.stringify([engagementId, lineKey, kind, localDate, minutes, rateMinor, shareBp, amountMinor]));
  return createHash('sha256').update(rows.sort().join('\n')).digest('hex');
}

/** Fixes the run for good: statements with their numbers, lessons locked, books posted, teachers told. */
export const closePayRun = (input: RunInput, context: Context): Promise<void> =>
  step(input, context, { state: 'closed', may: 'approve' }, async (trx, run, lines) => {
    const engagements = await engagementsIn(trx, { from: run.startsOn, to: run.endsOn });
    for (const [engagementId, own] of byTeacher(lines)) {
      const teacher = engagements.find((engagement) => engagement.engagementId === engagementId);
      if (teacher) await writeStatement(trx, context, { run, teacher, lines: own });
    }
    const totals = payTotalsOf(lines);
    await changePayRun(trx, run.id, { state: 'closed', closedAt: context.now, closedBy: context.actor.personId, totalsJson: JSON.stringify(totals), snapshotHash: snapshotHash(lines) });
    await lockOccurrences(trx, run.id);
    const owedMinor = totals.grossMinor + totals.reimbursementMinor;
    const entry = { id: newId(), legalEntityId: run.legalEntityId, postedOn: run.endsOn, documentKind: 'pay_run' as const, documentId: run.id, memo: run.label, currency: run.currency };
    const books = [
      { accountCode: 'teaching_pay', debitMinor: totals.grossMinor, creditMinor: 0 }, { accountCode: 'travel_costs', debitMinor: totals.reimbursementMinor, creditMinor: 0 },
      { accountCode: 'pay_owed', debitMinor: 0, creditMinor: owedMinor },
    ];
    await postJournal(trx, entry, books.filter(({ debitMinor, creditMinor }) => debitMinor + creditMinor > 0), null);
    return `Closed ${run.label}: ${say(owedMinor, { currency: run.currency, locale: context.school.locale })} for ${plural(byTeacher(lines).size, 'teacher')}.`;
  });

type Writing = { run: PayRunWithPeriod; teacher: Engagement; lines: StoredPayLine[] };

async function writeStatement(trx: Trx, context: Context, { run, teacher, lines }: Writing): Promise<void> {
  const totals = payTotalsOf(lines);
  const number = await takeNumber(trx, run.legalEntityId, 'pay_statement');
  await insertStatement(trx, {
    id: newId(), payRunId: run.id, engagementId: teacher.engagementId, legalEntityId: run.legalEntityId, ...number, grossMinor: totals.grossMinor, reimbursementMinor: totals.reimbursementMinor,
    currency: run.currency, totalsJson: JSON.stringify(totals),
  });
  await queueMail(trx, context, { personId: teacher.personId }, {
    topic: 'pay_check', key: `pay_statement:${run.id}:${teacher.engagementId}`, subjectRef: run.id, subject: `Pay statement ${number.documentNo}`,
    lines: [`Your pay statement for ${run.label} is ready: ${say(totals.grossMinor, { currency: run.currency, locale: context.school.locale })} gross, before tax.`],
    link: { label: 'Open my hours', url: `${env().NEXTAUTH_URL}/my-hours` },
  });
}
