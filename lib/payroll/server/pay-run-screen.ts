import 'server-only';
import { engagementsIn, tuitionAndPayByMonth, type Engagement } from '@/db/pay-facts';
import { linesOfRun, type StoredPayLine } from '@/db/pay-lines';
import { allPayRuns, checksOf, findPayRun, queriesOf, type PayCheck, type PayQuery, type PayRunWithPeriod } from '@/db/pay-runs';
import { formatDate, plural } from '@/lib/format';
import { notFound } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import { addMonths, type LocalDate } from '@/lib/time';
import { assertCan } from '@/policies/ability';
import { mendedBy } from '../pay-lines';
import type { PayRunState } from '../pay-run-state';
import { payTotalsOf, type PayTotals } from '../pay-totals';

export type PayRunRow = { payRunId: string; label: string; state: PayRunState; startsOn: LocalDate; endsOn: LocalDate; teachers: number; grossMinor: number; problems: number; openQueries: number; currency: string };

export async function payRunList(context: Context): Promise<{ runs: PayRunRow[]; today: LocalDate }> {
  assertCan(context.ability, 'read', 'PayRun', {});
  const runs: PayRunRow[] = [];
  for (const run of await allPayRuns(context.db)) {
    const lines = await linesOfRun(context.db, run.id);
    const { grossMinor, problems } = payTotalsOf(lines);
    const openQueries = (await queriesOf(context.db, run.id)).filter(({ state }) => state === 'open').length;
    runs.push({ payRunId: run.id, label: run.label, state: run.state, startsOn: run.startsOn, endsOn: run.endsOn, teachers: new Set(lines.map(({ engagementId }) => engagementId)).size, grossMinor, problems, openQueries, currency: run.currency });
  }
  return { runs, today: context.today };
}

export type TeacherSays = { words: string; tone: 'ok' | 'wait' | 'bad' | 'neutral' };
export type TeacherRow = PayTotals & { engagementId: string; name: string; says: TeacherSays };
export type RunProblem = { engagementId: string; name: string; localDate: LocalDate; text: string; problem: string; mendedBy: ReturnType<typeof mendedBy> };
export type RunQuery = { queryId: string; engagementId: string; name: string; aboutOn: LocalDate; aboutText: string; text: string };
export type MonthShare = { month: string; tuitionMinor: number; payMinor: number };
export type PayRunScreen = {
  payRunId: string; label: string; kindWords: string; state: PayRunState; startsOn: LocalDate; endsOn: LocalDate; answerByOn: LocalDate | null; currency: string; today: LocalDate; isOver: boolean;
  teachers: TeacherRow[]; totals: PayTotals; problems: RunProblem[]; queries: RunQuery[]; months: MonthShare[]; blocked: string | null;
};

/** A pay run as the owner sees it: a row per teacher, what stands in the way, and pay beside tuition. */
export async function payRunScreen({ payRunId }: { payRunId: string }, context: Context): Promise<PayRunScreen> {
  assertCan(context.ability, 'read', 'PayRun', {});
  const run = await findPayRun(context.db, payRunId);
  if (!run) throw notFound('pay run');
  const facts = await factsOf(context, run);
  const teachers = facts.teachers.map((teacher) => teacherRow(teacher, facts, context.school.locale));
  const problems = facts.lines.filter(({ problem }) => problem !== '').map(({ engagementId, localDate, text, problem }) => ({ engagementId, name: facts.nameOf(engagementId), localDate, text, problem, mendedBy: mendedBy(problem) }));
  const queries = facts.queries.filter(({ state }) => state === 'open').map(({ id, engagementId, aboutOn, aboutText, text }) => ({ queryId: id, engagementId, name: facts.nameOf(engagementId), aboutOn, aboutText, text }));
  const { label, state, startsOn, endsOn, answerByOn, currency } = run;
  return {
    payRunId, label, kindWords: run.engagementKind === 'employee' ? 'Employees' : 'Contractors', state, startsOn, endsOn, answerByOn, currency, today: context.today, isOver: context.today > endsOn, teachers, totals: payTotalsOf(facts.lines), problems, queries,
    months: (await tuitionAndPayByMonth(context.db, addMonths(startsOn, -3))).filter(({ month }) => month <= startsOn.slice(0, 7)).slice(-4), blocked: blockedBy(problems, queries),
  };
}

type Facts = { lines: StoredPayLine[]; checks: PayCheck[]; queries: PayQuery[]; teachers: Engagement[]; nameOf: (engagementId: string) => string };

async function factsOf({ db }: Context, run: PayRunWithPeriod): Promise<Facts> {
  const lines = await linesOfRun(db, run.id);
  const engagements = await engagementsIn(db, { from: run.startsOn, to: run.endsOn });
  const paid = new Set(lines.map(({ engagementId }) => engagementId));
  return {
    lines, checks: await checksOf(db, run.id), queries: await queriesOf(db, run.id), teachers: engagements.filter(({ engagementId }) => paid.has(engagementId)),
    nameOf: (engagementId) => engagements.find((engagement) => engagement.engagementId === engagementId)?.name ?? '',
  };
}

function teacherRow({ engagementId, name }: Engagement, { lines, checks, queries }: Facts, locale: string): TeacherRow {
  const totals = payTotalsOf(lines.filter((line) => line.engagementId === engagementId));
  const open = queries.find((query) => query.engagementId === engagementId && query.state === 'open');
  return { engagementId, name, ...totals, says: saysOf(totals, { open, check: checks.find((check) => check.engagementId === engagementId), locale }) };
}

function saysOf({ problems }: PayTotals, { open, check, locale }: { open: PayQuery | undefined; check: PayCheck | undefined; locale: string }): TeacherSays {
  if (problems > 0) return { words: `${plural(problems, 'line')} to put right`, tone: 'bad' };
  if (open) return { words: `asked about ${formatDate(open.aboutOn, locale)}`, tone: 'wait' };
  if (!check) return { words: 'not asked yet', tone: 'neutral' };
  if (check.state === 'agreed') return { words: 'agreed', tone: 'ok' };
  return check.state === 'passed_over' ? { words: 'went on without', tone: 'neutral' } : { words: 'not answered', tone: 'wait' };
}

/** Why it cannot be closed yet, in one sentence. */
function blockedBy(problems: readonly RunProblem[], queries: readonly RunQuery[]): string | null {
  const parts = [
    ...[...new Set(problems.map(({ name }) => name))].map((name) => `put right ${plural(problems.filter((problem) => problem.name === name).length, 'line')} of ${name}`),
    ...queries.map(({ name }) => `answer ${name}’s question`),
  ];
  if (parts.length === 0) return null;
  const sentence = parts.length > 4 ? `${parts.slice(0, 3).join(', ')} and ${parts.length - 3} more things` : parts.join(' and ');
  return `${sentence.charAt(0).toUpperCase()}${sentence.slice(1)} first.`;
}
