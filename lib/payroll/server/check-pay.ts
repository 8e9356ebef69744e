import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import type { Trx } from '@/db/connection';
import { findPayLine } from '@/db/pay-lines';
import { insertQuery, queriesOf, setCheck, type PayQuery, type PayRunWithPeriod } from '@/db/pay-runs';
import { transaction } from '@/db/transaction';
import { AppError, notFound } from '@/lib/errors';
import { formatDate } from '@/lib/format';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { assertCan } from '@/policies/ability';
import type { askSchema, passOverSchema, payTeacherSchema } from '../schema';
import { hasOpenQuery, isWithTeachers, moveOn, runAndTeacher, totalOf } from './pay-check';

/** The teacher looked at every line and agrees. */
export async function agreeToPay({ payRunId, engagementId }: z.output<typeof payTeacherSchema>, context: Context): Promise<void> {
  await transaction(context.db, async (trx) => {
    const { run, teacher } = await runAndTeacher(trx, payRunId, engagementId);
    assertCan(context.ability, 'update', 'PayLine', teacher);
    if (!isWithTeachers(run)) throw new AppError('conflict', 'This pay run is not open for checking.');
    if (await hasOpenQuery(trx, payRunId, engagementId)) throw new AppError('conflict', 'A question of yours is still open. Wait for the answer first.');
    await setCheck(trx, { payRunId, engagementId, state: 'agreed', totalMinor: await totalOf(trx, payRunId, engagementId), reason: '', at: context.now });
    await moveOn(trx, run);
    await recordAudit(trx, context, { action: 'agree', tableName: 'pay_run', rowId: payRunId, sentence: `${teacher.name} agreed to ${run.label}.` });
  });
}

type Asking = z.output<typeof askSchema>;

/** A question about one line, or about something that is missing on a day. The run waits for its answer. */
export async function askAboutPay(input: Asking, context: Context): Promise<void> {
  await transaction(context.db, async (trx) => {
    const { run, teacher } = await runAndTeacher(trx, input.payRunId, input.engagementId);
    assertCan(context.ability, 'update', 'PayLine', teacher);
    if (!isWithTeachers(run)) throw new AppError('conflict', 'This pay run is not open for checking. A closed one is put right in the next.');
    const about = await subjectOf(trx, run, input);
    await insertQuery(trx, { id: newId(), payRunId: run.id, engagementId: teacher.engagementId, ...about, text: input.text, askedBy: context.actor.personId, askedAt: context.now });
    await setCheck(trx, { payRunId: run.id, engagementId: teacher.engagementId, state: 'queried', totalMinor: await totalOf(trx, run.id, teacher.engagementId), reason: '', at: context.now });
    await moveOn(trx, run);
    await recordAudit(trx, context, { action: 'ask', tableName: 'pay_run', rowId: run.id, sentence: `${teacher.name} asked about ${formatDate(about.aboutOn, context.school.locale)} in ${run.label}: ${input.text}` });
  });
}

/** The line asked about, which must be the teacher's own, or the day on which something is missing. */
async function subjectOf(trx: Trx, run: PayRunWithPeriod, { lineId, engagementId, aboutOn }: Asking): Promise<Pick<PayQuery, 'payLineId' | 'aboutOn' | 'aboutText'>> {
  if (lineId === null) {
    if (aboutOn < run.startsOn || aboutOn > run.endsOn) throw new AppError('invalid', 'This day is not in the period.', { aboutOn: ['Choose a day of the period.'] });
    return { payLineId: null, aboutOn, aboutText: 'Something is missing' };
  }
  const line = await findPayLine(trx, lineId);
  if (line?.payRunId !== run.id || line.engagementId !== engagementId) throw notFound('line');
  const isAsked = (await queriesOf(trx, run.id)).some((query) => query.payLineId === lineId && query.state === 'open');
  if (isAsked) throw new AppError('conflict', 'You have asked about this line already.');
  return { payLineId: line.id, aboutOn: line.localDate, aboutText: line.text };
}

/** A teacher has not answered by the day: the owner goes on, and says why. */
export async function passOverTeacher({ payRunId, engagementId, reason }: z.output<typeof passOverSchema>, context: Context): Promise<void> {
  assertCan(context.ability, 'approve', 'PayRun', {});
  await transaction(context.db, async (trx) => {
    const { run, teacher } = await runAndTeacher(trx, payRunId, engagementId);
    if (!isWithTeachers(run)) throw new AppError('conflict', 'This pay run is not with the teachers.');
    if (run.answerByOn === null || context.today <= run.answerByOn) throw new AppError('conflict', 'The day for answers has not passed.');
    if (await hasOpenQuery(trx, payRunId, engagementId)) throw new AppError('conflict', 'A question is open. Answer it first.');
    await setCheck(trx, { payRunId, engagementId, state: 'passed_over', totalMinor: await totalOf(trx, payRunId, engagementId), reason, at: context.now });
    await moveOn(trx, run);
    await recordAudit(trx, context, { action: 'pass_over', tableName: 'pay_run', rowId: payRunId, sentence: `Went on with ${run.label} without ${teacher.name}’s answer: ${reason}` });
  });
}
