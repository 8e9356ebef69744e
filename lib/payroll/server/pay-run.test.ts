import ExcelJS from 'exceljs';
import type { Knex } from 'knex';
import { beforeEach, describe, expect, it } from 'vitest';
import { insertTimeEntry } from '@/db/pay-facts';
import { findPayRun } from '@/db/pay-runs';
import { transaction } from '@/db/transaction';
import type { Attendance } from '@/lib/calendar/attendance';
import type { Context } from '@/lib/server/context';
import { enrolled, lanternMoney } from '@/tests/factories/lantern-money';
import { lanternPay } from '@/tests/factories/lantern-pay';
import { lanternStreet } from '@/tests/factories/lantern-street';
import { contextOf } from '@/tests/support/context';
import { freshDb } from '@/tests/support/fresh-db';
import { answerPayQuery } from './answer-pay-query';
import { agreeToPay, askAboutPay, passOverTeacher } from './check-pay';
import { approvePayRun, closePayRun, sendForCheck } from './close-pay-run';
import { buildPayRuns, gatherPayRun } from './gather-pay-run';
import { payRunList, payRunScreen } from './pay-run-screen';
import { payWorkbook } from './pay-workbook';
import { myHours, teacherPay } from './teacher-pay';

const school = { zone: 'America/New_York', currency: 'USD', locale: 'en-US' };
const NOVEMBER = Date.UTC(2026, 10, 2, 12) / 1000;
const MARA = 'engagement-mara';
let db: Knex;
let owner: Context;
let mara: Context;
let day = 0;

beforeEach(async () => {
  db = freshDb();
  day = 0;
  await lanternStreet(db);
  await lanternMoney(db);
  await lanternPay(db);
  owner = contextOf(db, 'owner', { personId: 'ruth', now: NOVEMBER, school });
  mara = contextOf(db, 'teacher', { personId: 'mara', now: NOVEMBER, school });
});

const dates = (count: number) => Array.from({ length: count }, () => `2026-10-${String((day++ % 15) + 1).padStart(2, '0')}`);

/** Mara's lessons of one length with one mark, on days from 1 to 15 October. */
async function lessons(count: number, lengthMinutes: number, attendance: Attendance): Promise<string[]> {
  const { occurrenceIds } = await enrolled(db, { studentId: 'ada', lengthMinutes, dates: dates(count), startMin: 600 + day });
  if (attendance !== 'expected') await db('seat').whereIn('occurrenceId', occurrenceIds).update({ attendance, markedAt: 1, rowVersion: 2 });
  return occurrenceIds;
}

async function fortnight(): Promise<string[]> {
  const present = await lessons(10, 30, 'present');
  await lessons(1, 30, 'no_show');
  await lessons(1, 30, 'late_notice');
  await lessons(2, 30, 'away_with_notice');
  await lessons(4, 45, 'present');
  await lessons(3, 60, 'present');
  await transaction(db, async (trx) => {
    await insertTimeEntry(trx, { id: 't1', engagementId: MARA, workType: 'recital', localDate: '2026-10-10', minutes: 180, note: 'Autumn recital', state: 'approved' });
    await insertTimeEntry(trx, { id: 't2', engagementId: MARA, workType: 'admin', localDate: '2026-10-11', minutes: 90, state: 'approved' });
    await insertTimeEntry(trx, { id: 't3', engagementId: MARA, workType: 'admin', localDate: '2026-10-12', minutes: 600, state: 'submitted' });
  });
  return present;
}

async function built(): Promise<string> {
  await buildPayRuns({ month: '2026-10' }, owner);
  const { runs } = await payRunList(owner);
  return runs.find(({ label }) => label === 'October 2026, employees')!.payRunId;
}
const send = (payRunId: string) => sendForCheck({ payRunId, answerByOn: '2026-11-04' }, owner);
const lineOf = async (payRunId: string, text: string) => (await teacherPay({ payRunId, engagementId: MARA }, owner)).lines.find((line) => line.text.includes(text))!;

describe('S26 through the operations', () => {
  it('562.50 gross, every line explained, only approved time counted', async () => {
    await fortnight();
    const payRunId = await built();
    const screen = await payRunScreen({ payRunId }, owner);
    expect(screen.teachers).toMatchObject([{ name: 'Mara', lessons: 19, teachingMinor: 47_550, otherMinor: 8700, grossMinor: 56_250, says: { words: 'not asked yet' } }]);
    const pay = await teacherPay({ payRunId, engagementId: MARA }, owner);
    expect(pay.lines).toHaveLength(23);
    for (const line of pay.lines) expect(line.steps.length).toBeGreaterThan(0);
    expect(pay.summary.map(({ sentence }) => sentence)).toContain('4 × 45 min at $30.00 = $120.00');
  });

  it('a substitute is paid in the run of their own kind, the absent teacher nothing', async () => {
    const [covered] = await lessons(2, 60, 'present');
    await db('occurrence').where({ id: covered }).update({ taughtById: 'leo' });
    await built();
    const contractors = (await payRunList(owner)).runs.find(({ label }) => label.endsWith('contractors'))!;
    expect((await payRunScreen({ payRunId: contractors.payRunId }, owner)).teachers).toMatchObject([{ name: 'Leo', grossMinor: 3420 }]);
    const employees = (await payRunList(owner)).runs.find(({ label }) => label.endsWith('employees'))!;
    expect(employees).toMatchObject({ grossMinor: 3800 });
  });
});

describe('what stands in the way', () => {
  it('an unmarked lesson and a missing rate are said and block the next step', async () => {
    await lessons(1, 30, 'expected');
    await lessons(1, 50, 'present');
    const payRunId = await built();
    const screen = await payRunScreen({ payRunId }, owner);
    expect(screen.problems.map(({ problem }) => problem).sort()).toEqual(['Not marked yet: Ada Vale.', 'There is no rate for lesson of 50 minutes.']);
    expect(screen.problems.map(({ problem, mendedBy }) => [problem.slice(0, 3), mendedBy]).sort()).toEqual([['Not', 'marks'], ['The', 'rates']]);
    expect(screen.teachers[0]?.says).toEqual({ words: '2 lines to put right', tone: 'bad' });
    expect(screen.blocked).toBe('Put right 2 lines of Mara first.');
    await expect(send(payRunId)).rejects.toMatchObject({ message: '2 lines cannot be paid yet. Put them right first.' });
  });

  it('lessons still to come are not missing marks, and the period must be over', async () => {
    await lessons(3, 30, 'expected');
    const early = contextOf(db, 'owner', { personId: 'ruth', now: Date.UTC(2026, 9, 1, 12) / 1000, school });
    const { payRunIds } = await buildPayRuns({ month: '2026-10' }, early);
    expect((await payRunScreen({ payRunId: payRunIds[0]! }, early)).problems).toEqual([]);
    await expect(buildPayRuns({ month: '2026-11' }, early)).rejects.toMatchObject({ fields: { month: [expect.any(String)] } });
  });

  it('built again, it follows the marks and keeps the lines that stay', async () => {
    const [first] = await lessons(2, 30, 'present');
    const payRunId = await built();
    const before = await teacherPay({ payRunId, engagementId: MARA }, owner);
    await db('seat').where({ occurrenceId: first }).update({ attendance: 'away_with_notice', rowVersion: 3 });
    await gatherPayRun({ payRunId }, owner);
    const after = await teacherPay({ payRunId, engagementId: MARA }, owner);
    expect(after.totals.grossMinor).toBe(2100);
    expect(after.lines.map(({ lineId }) => lineId)).toEqual(before.lines.map(({ lineId }) => lineId));
  });
});

describe('S31 the teacher’s own check', () => {
  it('asks, is answered, agrees; then it is approved and closed for good', async () => {
    const [first] = await fortnight();
    const payRunId = await built();
    await send(payRunId);
    const noShow = await lineOf(payRunId, 'did not come');
    await askAboutPay({ payRunId, engagementId: MARA, lineId: null, aboutOn: '2026-10-07', text: 'The group of the 7th is missing' }, mara);
    await askAboutPay({ payRunId, engagementId: MARA, lineId: noShow.lineId, aboutOn: noShow.localDate, text: 'This one was 45 minutes' }, mara);
    expect((await payRunScreen({ payRunId }, owner)).state).toBe('answering_queries');
    await expect(approvePayRun({ payRunId }, owner)).rejects.toMatchObject({ code: 'conflict' });
    await expect(agreeToPay({ payRunId, engagementId: MARA }, mara)).rejects.toMatchObject({ code: 'conflict' });
    const [missing, longer] = (await payRunScreen({ payRunId }, owner)).queries;
    await answerPayQuery({ queryId: missing!.queryId, isAccepted: true, answer: 'You are right, it took place', amountChange: '30,00' }, owner);
    await answerPayQuery({ queryId: longer!.queryId, isAccepted: false, answer: 'The calendar says 30 minutes', amountChange: '' }, owner);
    const checked = await myHours({}, mara);
    expect(checked.current).toMatchObject({ totals: { grossMinor: 59_250, correctionMinor: 3000 }, check: 'waiting', queries: [{ state: 'accepted', amountChangeMinor: 3000 }, { state: 'declined', answer: 'The calendar says 30 minutes' }] });
    await agreeToPay({ payRunId, engagementId: MARA }, mara);
    expect((await payRunScreen({ payRunId }, owner)).state).toBe('ready_to_approve');
    await approvePayRun({ payRunId }, owner);
    await closePayRun({ payRunId }, owner);
    expect(await findPayRun(db, payRunId)).toMatchObject({ state: 'closed', snapshotHash: expect.stringMatching(/^[0-9a-f]{64}$/) as string });
    expect(await db('occurrence').where({ id: first }).first('lockedByPayRunId')).toEqual({ lockedByPayRunId: payRunId });
    expect(await myHours({}, mara)).toMatchObject({ current: { statementNo: 'L-P00001', state: 'closed' } });
    await expect(gatherPayRun({ payRunId }, owner)).rejects.toMatchObject({ message: 'This pay run is closed. A change goes into the next run as a correction.' });
    await expect(askAboutPay({ payRunId, engagementId: MARA, lineId: null, aboutOn: '2026-10-07', text: 'One more thing' }, mara)).rejects.toMatchObject({ code: 'conflict' });
    const mails: { subject: string }[] = await db('outbox').where({ topic: 'pay_check' }).orderBy('createdAt').select('subject');
    expect(mails).toHaveLength(4);
  });

  it('fifty closings at once are one', async () => {
    await fortnight();
    const payRunId = await built();
    await send(payRunId);
    await agreeToPay({ payRunId, engagementId: MARA }, mara);
    await approvePayRun({ payRunId }, owner);
    const results = await Promise.allSettled(Array.from({ length: 50 }, () => closePayRun({ payRunId }, owner)));
    expect(results.filter(({ status }) => status === 'fulfilled')).toHaveLength(1);
    expect(await db('pay_statement')).toHaveLength(1);
  });

  it('a fact changed meanwhile asks only the teacher whom it concerns', async () => {
    const [first] = await fortnight();
    const { occurrenceIds } = await enrolled(db, { studentId: 'ben', dates: ['2026-10-20'], startMin: 1200 });
    await db('occurrence').whereIn('id', occurrenceIds).update({ plannedTeacherId: 'ines' });
    await db('seat').whereIn('occurrenceId', occurrenceIds).update({ attendance: 'present', markedAt: 1, rowVersion: 2 });
    const payRunId = await built();
    await send(payRunId);
    await agreeToPay({ payRunId, engagementId: MARA }, mara);
    await agreeToPay({ payRunId, engagementId: 'engagement-ines' }, contextOf(db, 'teacher', { personId: 'ines', now: NOVEMBER, school }));
    await db('seat').where({ occurrenceId: first }).update({ attendance: 'no_show', rowVersion: 3 });
    await gatherPayRun({ payRunId }, owner);
    expect((await payRunScreen({ payRunId }, owner)).state).toBe('ready_to_approve');
    await db('seat').where({ occurrenceId: first }).update({ attendance: 'late_notice', rowVersion: 4 });
    await gatherPayRun({ payRunId }, owner);
    const screen = await payRunScreen({ payRunId }, owner);
    expect(screen.state).toBe('with_teachers');
    expect(screen.teachers.map(({ name, says }) => [name, says.words])).toEqual([['Ines', 'agreed'], ['Mara', 'not answered']]);
  });

  it('goes on without an answer only after its day, with a reason', async () => {
    await fortnight();
    const payRunId = await built();
    await send(payRunId);
    const pass = (now: number) => passOverTeacher({ payRunId, engagementId: MARA, reason: 'On leave, told by phone' }, contextOf(db, 'owner', { personId: 'ruth', now, school }));
    await expect(pass(NOVEMBER)).rejects.toMatchObject({ code: 'conflict' });
    await pass(NOVEMBER + 4 * 86_400);
    expect((await payRunScreen({ payRunId }, owner)).state).toBe('ready_to_approve');
  });
});

describe('walls and locks', () => {
  let payRunId: string;
  beforeEach(async () => {
    await fortnight();
    payRunId = await built();
    await send(payRunId);
  });

  it('only the teacher’s own figures reach a teacher', async () => {
    const leo = contextOf(db, 'teacher', { personId: 'leo', now: NOVEMBER, school });
    expect(await myHours({}, leo)).toEqual({ runs: [], current: null });
    for (const attempt of [() => teacherPay({ payRunId, engagementId: MARA }, leo), () => agreeToPay({ payRunId, engagementId: MARA }, leo), () => payRunScreen({ payRunId }, leo), () => payRunList(mara),
      () => askAboutPay({ payRunId, engagementId: MARA, lineId: null, aboutOn: '2026-10-07', text: 'Not mine' }, leo), () => payWorkbook({ runId: payRunId, as: 'xlsx' }, mara), () => myHours({ payRunId }, leo)]) {
      await expect(attempt()).rejects.toMatchObject({ code: 'not_found' });
    }
  });

  it('the desk, guardians and students see no pay', async () => {
    for (const role of ['desk', 'guardian', 'student'] as const) {
      const context = contextOf(db, role, { now: NOVEMBER, school });
      await expect(payRunList(context)).rejects.toMatchObject({ code: 'not_found' });
      await expect(teacherPay({ payRunId, engagementId: MARA }, context)).rejects.toMatchObject({ code: 'not_found' });
      await expect(closePayRun({ payRunId }, context)).rejects.toMatchObject({ code: 'not_found' });
    }
  });

  it('the database refuses a change of a closed run', async () => {
    await agreeToPay({ payRunId, engagementId: MARA }, mara);
    await approvePayRun({ payRunId }, owner);
    await closePayRun({ payRunId }, owner);
    await expect(db('pay_line').update({ amountMinor: 1 })).rejects.toThrow('pay_run_closed');
    await expect(db('pay_line').delete()).rejects.toThrow('pay_run_closed');
    await expect(db('pay_run').where({ id: payRunId }).update({ state: 'gathering' })).rejects.toThrow('pay_run_closed');
    await expect(db('pay_statement').update({ grossMinor: 1 })).rejects.toThrow('pay_statement_fixed');
  });

  it('one live run for a period', async () => {
    const run = await findPayRun(db, payRunId);
    await expect(db('pay_run').insert({ id: 'second', payPeriodId: run?.payPeriodId })).rejects.toThrow('UNIQUE');
  });
});

describe('the workbook', () => {
  it('opens with the same totals, without formulas, and text that is safe', async () => {
    await fortnight();
    await db('person').where({ id: 'ada' }).update({ givenName: '=1+1' });
    const payRunId = await built();
    const response = await payWorkbook({ runId: payRunId, as: 'xlsx' }, owner);
    expect(response.headers.get('content-disposition')).toBe('attachment; filename="pay-october-2026-employees.xlsx"');
    const book = new ExcelJS.Workbook();
    await book.xlsx.load(await response.arrayBuffer());
    expect(book.worksheets.map(({ name }) => name)).toEqual(['Summary', 'Mara']);
    const [summary, sheet] = book.worksheets;
    expect(summary?.lastRow?.getCell(7).value).toBe(562.5);
    let wages = 0;
    sheet?.eachRow((row, index) => {
      row.eachCell((cell) => { expect(cell.type).not.toBe(ExcelJS.ValueType.Formula); });
      if (index > 3 && index < (sheet.lastRow?.number ?? 0)) wages += Number(row.getCell(7).value) * 100;
    });
    expect(Math.round(wages)).toBe(56_250);
    expect(sheet?.lastRow?.getCell(7).value).toBe(562.5);
    expect(sheet?.getRow(4).getCell(3).text).toMatch(/^'=1\+1/);
    expect(sheet?.getRow(4).getCell(1).value).toEqual(new Date('2026-10-01T00:00:00Z'));
  });

  it('the same closed run gives the same bytes of text', async () => {
    await fortnight();
    const payRunId = await built();
    const [one, two] = [await (await payWorkbook({ runId: payRunId, as: 'csv' }, owner)).text(), await (await payWorkbook({ runId: payRunId, as: 'csv' }, owner)).text()];
    expect(one).toBe(two);
    expect(one.split('\r\n')[0]).toContain('Teacher,Date,Start,What');
  });
});
