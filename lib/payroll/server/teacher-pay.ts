import 'server-only';
import type { Db } from '@/db/connection';
import { engagementsIn } from '@/db/pay-facts';
import { linesOfTeacher, type StoredPayLine } from '@/db/pay-lines';
import { allPayRuns, checksOf, findPayRun, queriesOf, statementOf, type PayCheck, type PayQuery, type PayRunWithPeriod } from '@/db/pay-runs';
import { notFound } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import type { LocalDate } from '@/lib/time';
import { assertCan } from '@/policies/ability';
import type { PayRunState } from '../pay-run-state';
import { payTotalsOf, summaryOf, type PayTotals, type SummaryRow } from '../pay-totals';

export type LineView = { lineId: string; localDate: LocalDate; startMin: number | null; text: string; kind: StoredPayLine['kind']; minutes: number; amountMinor: number; problem: string; steps: string[]; isAsked: boolean };
export type QueryView = { queryId: string; aboutOn: LocalDate; aboutText: string; text: string; state: PayQuery['state']; answer: string; amountChangeMinor: number };
export type TeacherPay = {
  payRunId: string; engagementId: string; name: string; label: string; state: PayRunState; startsOn: LocalDate; endsOn: LocalDate; answerByOn: LocalDate | null; currency: string;
  lines: LineView[]; summary: SummaryRow[]; totals: PayTotals; queries: QueryView[]; check: PayCheck['state'] | null; statementNo: string | null; mayAnswer: boolean; isPassable: boolean;
};

/** One teacher's lines in one run: for the owner, and for that teacher. Nobody else's figures are read. */
export async function teacherPay({ payRunId, engagementId }: { payRunId: string; engagementId: string }, context: Context): Promise<TeacherPay> {
  const run = await findPayRun(context.db, payRunId);
  const engagement = run && (await engagementsIn(context.db, { from: run.startsOn, to: run.endsOn })).find((candidate) => candidate.engagementId === engagementId);
  if (!run || !engagement) throw notFound('pay run');
  assertCan(context.ability, 'read', 'PayLine', engagement);
  return viewOf(context, run, { engagementId, name: engagement.name });
}

async function viewOf({ db, school, today }: Context, run: PayRunWithPeriod, { engagementId, name }: { engagementId: string; name: string }): Promise<TeacherPay> {
  const lines = await linesOfTeacher(db, run.id, engagementId);
  const queries = (await queriesOf(db, run.id)).filter((query) => query.engagementId === engagementId);
  const check = (await checksOf(db, run.id)).find((candidate) => candidate.engagementId === engagementId);
  const { id, label, state, startsOn, endsOn, answerByOn, currency } = run;
  return {
    payRunId: id, engagementId, name, label, state, startsOn, endsOn, answerByOn, currency, lines: lines.map((line) => lineView(line, queries)), summary: summaryOf(lines, { currency, locale: school.locale }), totals: payTotalsOf(lines),
    queries: queries.map(({ id: queryId, aboutOn, aboutText, text, state: queryState, answer, amountChangeMinor }) => ({ queryId, aboutOn, aboutText, text, state: queryState, answer, amountChangeMinor })),
    check: check?.state ?? null, statementNo: (await statementOf(db, id, engagementId))?.documentNo ?? null,
    mayAnswer: ['with_teachers', 'answering_queries', 'ready_to_approve'].includes(state), isPassable: check?.state === 'waiting' && answerByOn !== null && today > answerByOn,
  };
}

const lineView = (line: StoredPayLine, queries: readonly PayQuery[]): LineView => ({
  lineId: line.id, localDate: line.localDate, startMin: line.startMin, text: line.text, kind: line.kind, minutes: line.minutes, amountMinor: line.amountMinor, problem: line.problem, steps: line.explain,
  isAsked: queries.some((query) => query.payLineId === line.id && query.state === 'open'),
});

export type MyHours = { runs: { payRunId: string; label: string; state: PayRunState }[]; current: TeacherPay | null };

/** A teacher's own hours: the run asked for, or the newest; and the others to choose from. */
export async function myHours({ payRunId }: { payRunId?: string | undefined }, context: Context): Promise<MyHours> {
  const own = await ownRuns(context.db, context.actor.personId);
  for (const { personId } of own) assertCan(context.ability, 'read', 'PayLine', { personId });
  const chosen = own.find(({ run }) => run.id === payRunId) ?? own[0];
  if (payRunId !== undefined && chosen?.run.id !== payRunId) throw notFound('pay run');
  return { runs: own.map(({ run: { id, label, state } }) => ({ payRunId: id, label, state })), current: chosen ? await teacherPay({ payRunId: chosen.run.id, engagementId: chosen.engagementId }, context) : null };
}

async function ownRuns(db: Db, personId: string): Promise<{ run: PayRunWithPeriod; engagementId: string; personId: string }[]> {
  const runs: { run: PayRunWithPeriod; engagementId: string; personId: string }[] = [];
  for (const run of await allPayRuns(db)) {
    const mine = (await engagementsIn(db, { from: run.startsOn, to: run.endsOn })).filter((engagement) => engagement.personId === personId && engagement.kind === run.engagementKind && engagement.legalEntityId === run.legalEntityId);
    for (const { engagementId } of mine) if ((await linesOfTeacher(db, run.id, engagementId)).length > 0) runs.push({ run, engagementId, personId });
  }
  return runs;
}
