import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import type { Trx } from '@/db/connection';
import { insertPayLine } from '@/db/pay-lines';
import { answerQuery, findQuery, setCheck, type PayQuery, type PayRunWithPeriod } from '@/db/pay-runs';
import { transaction } from '@/db/transaction';
import { say } from '@/lib/explained';
import { AppError, notFound } from '@/lib/errors';
import { parseMoney } from '@/lib/money';
import { queueMail } from '@/lib/messages/server/queue-mail';
import type { Context } from '@/lib/server/context';
import { env } from '@/lib/server/env';
import { newId } from '@/lib/server/ids';
import { assertCan } from '@/policies/ability';
import type { answerSchema } from '../schema';
import { hasOpenQuery, moveOn, runAndTeacher, totalOf } from './pay-check';

type Answer = z.output<typeof answerSchema>;

/** The office answers. Accepted, the difference becomes a line of its own; the teacher is asked to look again. */
export async function answerPayQuery(input: Answer, context: Context): Promise<void> {
  assertCan(context.ability, 'update', 'PayRun', {});
  await transaction(context.db, async (trx) => {
    const query = await findQuery(trx, input.queryId);
    if (!query) throw notFound('question');
    if (query.state !== 'open') throw new AppError('conflict', 'This question has been answered already.');
    const { run, teacher } = await runAndTeacher(trx, query.payRunId, query.engagementId);
    const amountChangeMinor = input.isAccepted ? changeOf(input.amountChange, run.currency) : 0;
    await answerQuery(trx, query.id, { state: input.isAccepted ? 'accepted' : 'declined', answer: input.answer, amountChangeMinor, answeredBy: context.actor.personId, answeredAt: context.now });
    if (amountChangeMinor !== 0) await putRight(trx, context, { run, query, answer: input.answer, amountChangeMinor });
    const state = (await hasOpenQuery(trx, run.id, query.engagementId)) ? 'queried' : 'waiting';
    await setCheck(trx, { payRunId: run.id, engagementId: query.engagementId, state, totalMinor: await totalOf(trx, run.id, query.engagementId), reason: '', at: null });
    await moveOn(trx, run);
    await queueMail(trx, context, { personId: teacher.personId }, {
      topic: 'pay_check', key: `pay_query:${query.id}`, subjectRef: query.id, subject: `Your question about ${run.label}`,
      lines: [`You asked: ${query.text}`, `Answer: ${input.answer}`, 'Please look at your hours again and agree, or ask further.'], link: { label: 'Open my hours', url: `${env().NEXTAUTH_URL}/my-hours` },
    });
    await recordAudit(trx, context, { action: 'answer', tableName: 'pay_query', rowId: query.id, sentence: `${input.isAccepted ? 'Accepted' : 'Declined'} ${teacher.name}’s question in ${run.label}: ${input.answer}` });
  });
}

type Right = { run: PayRunWithPeriod; query: PayQuery; answer: string; amountChangeMinor: number };

async function putRight(trx: Trx, { school }: Context, { run, query, answer, amountChangeMinor }: Right): Promise<void> {
  await insertPayLine(trx, run.id, {
    id: newId(), queryId: query.id, engagementId: query.engagementId, kind: 'correction', lineKey: `query:${query.id}`, occurrenceId: null, localDate: query.aboutOn, startMin: null,
    text: `${query.aboutText}: put right`, minutes: 0, rateId: null, rateMinor: 0, shareBp: 10_000, amountMinor: amountChangeMinor, problem: '',
    explain: [`Asked: ${query.text}`, `Answered: ${answer}`, `Difference ${say(amountChangeMinor, { currency: run.currency, locale: school.locale })}`],
  });
}

function changeOf(typed: string, currency: string): number {
  if (typed === '') return 0;
  const minor = parseMoney(typed.replace('−', '-'), currency);
  if (minor === null) throw new AppError('invalid', 'The difference was not understood.', { amountChange: ['Write it like 30 or −12.50.'] });
  return minor;
}
