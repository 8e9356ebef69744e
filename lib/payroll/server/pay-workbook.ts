import 'server-only';
import type { StoredPayLine } from '@/db/pay-lines';
import { linesOfRun } from '@/db/pay-lines';
import { changePayRun, findPayRun, type PayRunWithPeriod } from '@/db/pay-runs';
import { engagementsIn, type Engagement } from '@/db/pay-facts';
import { recordAudit } from '@/db/audit';
import { transaction } from '@/db/transaction';
import { notFound } from '@/lib/errors';
import type { Cell } from '@/lib/exports/server/cells';
import { csvFile } from '@/lib/exports/server/csv';
import { download } from '@/lib/exports/server/download';
import { workbookFile, type WorkbookSheet } from '@/lib/exports/server/workbook';
import { divideRounded } from '@/lib/money';
import type { Context } from '@/lib/server/context';
import { clockOf } from '@/lib/time';
import { assertCan } from '@/policies/ability';
import { payTotalsOf, type PayTotals } from '../pay-totals';

const SUMMARY_COLUMNS = ['Teacher', 'Lessons', 'Hours', 'Teaching', 'Other work', 'Corrections', 'Gross', 'Reimbursed'];
const LINE_COLUMNS = ['Date', 'Start', 'What', 'Minutes', 'Rate', 'Share %', 'Wages', 'Reimbursed', 'How it was worked out'];
const NOTE = 'Gross amounts, before tax. Tax, social insurance and status follow your local law.';

type Paid = { teacher: Engagement; lines: StoredPayLine[] };

/** The run as a workbook: a summary and a sheet per teacher, with the same totals as the screen. A closed run is then marked as taken. */
export async function payWorkbook({ runId, as }: { runId: string; as: 'xlsx' | 'csv' }, context: Context): Promise<Response> {
  assertCan(context.ability, 'export', 'PayRun', {});
  const run = await findPayRun(context.db, runId);
  if (!run) throw notFound('pay run');
  const paid = await paidTeachers(context, run);
  const content = as === 'xlsx' ? await workbookFile({ currency: run.currency, madeAt: run.closedAt ?? run.gatheredAt ?? context.now, sheets: [summarySheet(run, paid), ...paid.map((teacher) => teacherSheet(run, teacher))] }) : csvOf(run, paid);
  await transaction(context.db, async (trx) => {
    if (run.state === 'closed') await changePayRun(trx, run.id, { state: 'exported' });
    await recordAudit(trx, context, { action: 'export', tableName: 'pay_run', rowId: run.id, sentence: `Took the workbook of ${run.label}.` });
  });
  return download(content, `pay ${run.label}`, as);
}

async function paidTeachers({ db }: Context, run: PayRunWithPeriod): Promise<Paid[]> {
  const lines = await linesOfRun(db, run.id);
  const engagements = await engagementsIn(db, { from: run.startsOn, to: run.endsOn });
  return engagements.map((teacher) => ({ teacher, lines: lines.filter(({ engagementId }) => engagementId === teacher.engagementId) })).filter((paid) => paid.lines.length > 0);
}

/** Hours with two decimals, as a number. */
const hours = (minutes: number): number => divideRounded(minutes * 100, 60) / 100;
const totalCells = (first: string, totals: PayTotals): Cell[] => [
  first, totals.lessons, hours(totals.minutes), { amountMinor: totals.teachingMinor }, { amountMinor: totals.otherMinor }, { amountMinor: totals.correctionMinor }, { amountMinor: totals.grossMinor }, { amountMinor: totals.reimbursementMinor },
];

const summarySheet = (run: PayRunWithPeriod, paid: Paid[]): WorkbookSheet => ({
  name: 'Summary', title: `${run.label}. ${NOTE}`, columns: SUMMARY_COLUMNS.map((header, index) => ({ header, width: index === 0 ? 28 : 13 })),
  rows: paid.map(({ teacher, lines }) => totalCells(teacher.name, payTotalsOf(lines))), totals: [totalCells('All', payTotalsOf(paid.flatMap(({ lines }) => lines)))],
});

function lineCells(line: StoredPayLine): Cell[] {
  const isRefunded = line.kind === 'reimbursement';
  return [
    { date: line.localDate }, line.startMin === null ? null : clockOf(line.startMin), line.text, line.minutes, { amountMinor: line.rateMinor }, line.shareBp / 100,
    isRefunded ? null : { amountMinor: line.amountMinor }, isRefunded ? { amountMinor: line.amountMinor } : null, line.explain.join(' · '),
  ];
}

function teacherSheet(run: PayRunWithPeriod, { teacher, lines }: Paid): WorkbookSheet {
  const totals = payTotalsOf(lines);
  return {
    name: teacher.name, title: `${teacher.name}, ${run.label}`, columns: LINE_COLUMNS.map((header, index) => ({ header, width: index === 2 ? 34 : index === 8 ? 70 : 12 })), rows: lines.map(lineCells),
    totals: [['Total', null, null, totals.minutes, null, null, { amountMinor: totals.grossMinor }, { amountMinor: totals.reimbursementMinor }, null]],
  };
}

const csvOf = (run: PayRunWithPeriod, paid: Paid[]): string =>
  csvFile(['Teacher', ...LINE_COLUMNS], paid.flatMap(({ teacher, lines }) => lines.map((line) => [teacher.name, ...lineCells(line)])), run.currency);
