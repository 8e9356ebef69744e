import { beforeEach, describe, expect, it } from 'vitest';
import type { Knex } from 'knex';
import { insertPercentSplit } from '@/db/families';
import { accountBalances } from '@/db/journal';
import { setHouseRule } from '@/db/settings';
import { transaction } from '@/db/transaction';
import { findTuitionRun, itemsOfRun } from '@/db/tuition-runs';
import { closedDatesFor, teachingDates } from '@/lib/calendar/term';
import type { Context } from '@/lib/server/context';
import { enrolled, lanternMoney, scholarship } from '@/tests/factories/lantern-money';
import { lanternStreet } from '@/tests/factories/lantern-street';
import { contextOf } from '@/tests/support/context';
import { freshDb } from '@/tests/support/fresh-db';
import { holdFamily, unholdFamily } from './hold-family';
import { previewTuitionRun } from './preview-tuition-run';
import { releaseTuitionRun } from './release-tuition-run';

const AUTUMN = { startsOn: '2026-09-08', endsOn: '2026-12-19' };
const CLOSED = closedDatesFor(['2026-10-12', '2026-11-26', '2026-11-27', '2026-11-28'].map((closedOn) => ({ closedOn, siteId: null, fromMin: null, toMin: null })), 'quay', 960, 30);
const dates = (weekday: number, from = AUTUMN.startsOn) => teachingDates(weekday, AUTUMN, CLOSED).filter((date) => date >= from);
const NEW_YORK = { zone: 'America/New_York', currency: 'USD', locale: 'en-US' };
const SEPTEMBER = Date.UTC(2026, 8, 1, 12) / 1000;

let db: Knex;
let owner: Context;
beforeEach(async () => {
  db = freshDb();
  await lanternStreet(db);
  await lanternMoney(db);
  owner = contextOf(db, 'owner', { personId: 'ruth', now: SEPTEMBER, school: NEW_YORK });
});

const preview = (over: object = {}, context = owner) =>
  previewTuitionRun({ kind: 'term', period: 'autumn', dueOn: '2026-09-15', instalments: 1, depositPercent: 0, ...over }, context);
const itemOf = async (runId: string) => (await itemsOfRun(db, runId))[0]!;
const controlTotal = async (runId: string): Promise<number> => (await findTuitionRun(db, runId))?.controlTotalMinor ?? -1;
const release = async (runId: string, context = owner) => releaseTuitionRun({ runId, controlTotalMinor: await controlTotal(runId) }, context);

/** S14: Ada 60 min, Ben 30 min and a group seat, all on Tuesdays; Ben holds a 25 % scholarship. */
async function vale(): Promise<void> {
  await enrolled(db, { studentId: 'ada', lengthMinutes: 60, dates: dates(2), startMin: 900 });
  await enrolled(db, { studentId: 'ben', lengthMinutes: 30, dates: dates(2), startMin: 960 });
  await enrolled(db, { studentId: 'ben', lengthMinutes: 60, type: 'group', dates: dates(2), startMin: 1020 });
  await scholarship(db, 'ben', 2500);
}
async function splitTuition(): Promise<void> {
  await transaction(db, async (trx) => {
    await insertPercentSplit(trx, { id: 'split-tuition', familyId: 'vale', chargeKind: 'tuition', parts: [{ payerId: 'payer-noor', bp: 6000 }, { payerId: 'payer-sam', bp: 4000 }] });
    await insertPercentSplit(trx, { id: 'split-rest', familyId: 'vale', chargeKind: '*', parts: [{ payerId: 'payer-sam', bp: 10_000 }] });
  });
}

describe('preview', () => {
  it('S14 discounts one after the other: 1,798.39, with every step', async () => {
    await vale();
    const { runId } = await preview();
    const item = await itemOf(runId);
    expect(item).toMatchObject({ state: 'planned', totalMinor: 179_839, changeKind: 'new' });
    expect(await controlTotal(runId)).toBe(179_839);
    const bill = JSON.parse(item.billJson) as { lines: { text: string; netMinor: number; explain: string[] }[] };
    expect(bill.lines.map(({ netMinor }) => netMinor)).toEqual([120_000, 42_525, 17_314]);
    expect(bill.lines[2]?.explain).toEqual([
      '15 × 60 min at $18.00 = $270.00', 'Second child, 10 %: $270.00 − $27.00 = $243.00', 'Second lesson, 5 %: $243.00 − $12.15 = $230.85',
      'Scholarship, 25 %: $230.85 − $57.71 = $173.14', 'Exempt from tax: private tuition',
    ]);
  });

  it('S14 best automatic discount only: 1,807.50', async () => {
    await vale();
    await transaction(db, (trx) => setHouseRule(trx, { id: 'rule', key: 'tuition.discount_mode', value: 'best_only', validFrom: '2026-01-01', approvedBy: 'ruth' }));
    expect(await itemOf((await preview()).runId)).toMatchObject({ totalMinor: 180_750 });
  });

  it('S10 a flat term fee for the lessons that are left: 395.36', async () => {
    await enrolled(db, { studentId: 'ada', dates: dates(4, '2026-10-15'), tuitionModel: 'per_term_flat', unitPriceMinor: 61_500 });
    expect(await itemOf((await preview()).runId)).toMatchObject({ totalMinor: 39_536 });
  });

  it('S04 counts the lessons of the weekday', async () => {
    await enrolled(db, { studentId: 'ada', dates: dates(1) });
    expect(await itemOf((await preview()).runId)).toMatchObject({ totalMinor: 54_600 });
  });

  it('charges a new student once for registration', async () => {
    await enrolled(db, { studentId: 'ada', dates: dates(2), startsOn: '2026-09-08' });
    const { runId } = await preview();
    expect(await itemOf(runId)).toMatchObject({ totalMinor: 63_000 + 3500 });
    await release(runId);
    await enrolled(db, { studentId: 'ada', dates: dates(4), startsOn: '2026-09-08', startMin: 700 });
    const later = await preview();
    expect(await itemOf(later.runId)).toMatchObject({ totalMinor: Math.round(58_800 * 0.95) });
  });

  it('says what stands in the way instead of guessing', async () => {
    await enrolled(db, { studentId: 'ada', dates: dates(2), lengthMinutes: 50 });
    const item = await itemOf((await preview()).runId);
    expect(item).toMatchObject({ state: 'problem', problem: 'There is no price for a 50 min lesson, which Ada Vale has.', totalMinor: 0 });
  });

  it('worked out again, it follows what changed and keeps held families held', async () => {
    await enrolled(db, { studentId: 'ada', dates: dates(2) });
    const { runId } = await preview();
    await holdFamily({ runId, familyId: 'vale', reason: 'Waiting for the new contract' }, owner);
    expect(await controlTotal(runId)).toBe(0);
    await enrolled(db, { studentId: 'ben', dates: dates(4) });
    expect((await preview()).runId).toBe(runId);
    expect(await itemOf(runId)).toMatchObject({ state: 'held', heldReason: 'Waiting for the new contract', totalMinor: 63_000 + 52_920 });
    await unholdFamily({ runId, familyId: 'vale' }, owner);
    expect(await controlTotal(runId)).toBe(115_920);
  });

  it('is for the owner', async () => {
    for (const role of ['desk', 'teacher', 'guardian', 'student'] as const) await expect(preview({}, contextOf(db, role))).rejects.toMatchObject({ name: 'AppError' });
  });
});

describe('release', () => {
  it('S16 issues one invoice with the shares of the payers, and mails each their own', async () => {
    await vale();
    await splitTuition();
    const { runId } = await preview();
    await release(runId);
    expect(await db('invoice')).toMatchObject([{ documentNo: 'L-00001', sequenceNo: 1, state: 'issued', totalMinor: 179_839 }]);
    const shares: { payerId: string; amountMinor: number }[] = await db('invoice_share').orderBy('payerId').select('payerId', 'amountMinor');
    expect(shares).toEqual([{ payerId: 'payer-noor', amountMinor: 107_903 }, { payerId: 'payer-sam', amountMinor: 71_936 }]);
    const mails: { toAddress: string; bodyText: string }[] = await db('outbox').orderBy('toAddress');
    expect(mails.map(({ toAddress }) => toAddress)).toEqual(['noor@example.com', 'sam@example.com']);
    expect(mails[0]?.bodyText).toContain('Tuition: your 60 % of $1,798.39 = $1,079.03');
    expect(mails[0]?.bodyText).not.toMatch(/sam|719\.36|40 %/i);
    expect(mails[1]?.bodyText).not.toMatch(/noor|1,079\.03|60 %/i);
    expect(await accountBalances(db)).toEqual([{ accountCode: 'deferred_tuition', balanceMinor: -179_839 }, { accountCode: 'receivable', balanceMinor: 179_839 }]);
  });

  it('fifty releases at once are one', async () => {
    await vale();
    const { runId } = await preview();
    const total = await controlTotal(runId);
    const results = await Promise.all(Array.from({ length: 50 }, () => releaseTuitionRun({ runId, controlTotalMinor: total }, owner)));
    for (const result of results) expect(result).toEqual({ runId, invoices: 1, totalMinor: 179_839 });
    expect(await db('invoice')).toHaveLength(1);
    expect(await db('outbox')).toHaveLength(1);
    expect(await db('number_series').where({ kind: 'invoice' })).toMatchObject([{ nextNo: 2 }]);
  });

  it('stopped half-way, it goes on and leaves no gap in the numbers', async () => {
    await enrolled(db, { studentId: 'ada', dates: dates(2) });
    await transaction(db, async (trx) => {
      await trx('family').insert({ id: 'marsh', name: 'Marsh', legalEntityId: 'lantern', currency: 'USD' });
      await trx('payer').insert({ id: 'payer-theo', familyId: 'marsh', personId: 'theo' });
    });
    await enrolled(db, { studentId: 'theo', familyId: 'marsh', dates: dates(3) });
    const { runId } = await preview();
    const total = await controlTotal(runId);
    const stop = () => { throw new Error('the power went'); };
    await expect(releaseTuitionRun({ runId, controlTotalMinor: total }, owner, stop)).rejects.toThrow('the power went');
    expect(await db('invoice')).toHaveLength(1);
    const seen: object[] = [];
    await expect(releaseTuitionRun({ runId, controlTotalMinor: total }, owner, (progress) => void seen.push(progress))).resolves.toMatchObject({ invoices: 2, totalMinor: 126_000 });
    expect(seen).toEqual([{ done: 2, total: 2 }]);
    expect((await db('invoice').orderBy('sequenceNo').select('sequenceNo'))).toEqual([{ sequenceNo: 1 }, { sequenceNo: 2 }]);
  });

  it('leaves held and faulty bills behind, and refuses a total that was not looked at', async () => {
    await enrolled(db, { studentId: 'ada', dates: dates(2) });
    const { runId } = await preview();
    await expect(releaseTuitionRun({ runId, controlTotalMinor: 1 }, owner)).rejects.toMatchObject({ code: 'conflict' });
    await holdFamily({ runId, familyId: 'vale', reason: 'Asked to wait' }, owner);
    await expect(release(runId)).resolves.toMatchObject({ invoices: 0 });
    expect(await db('invoice')).toEqual([]);
  });

  it('does not bill the same lessons twice in a later run of the term', async () => {
    await enrolled(db, { studentId: 'ada', dates: dates(2) });
    await release((await preview()).runId);
    const { runId } = await preview();
    expect(await itemsOfRun(db, runId)).toEqual([]);
    expect(await db('tuition_run').where({ id: runId }).first()).toMatchObject({ label: 'Autumn 2026/27, later enrolments' });
    await enrolled(db, { studentId: 'ben', dates: dates(4), startMin: 720 });
    await preview();
    expect(await itemOf(runId)).toMatchObject({ totalMinor: 52_920, changeKind: 'changed', changeText: 'New: Ben Vale: Keyboard harmony', lastTotalMinor: null });
  });

  it('compares the next term with this one', async () => {
    const { enrolmentId } = await enrolled(db, { studentId: 'ada', dates: dates(2) });
    await release((await preview()).runId);
    const winter = teachingDates(2, { startsOn: '2027-01-11', endsOn: '2027-03-27' }, CLOSED);
    await transaction(db, async (trx) => {
      const [first]: { id: string }[] = await trx('occurrence').limit(1).select('id');
      const model = await trx('occurrence').where({ id: first!.id }).first() as Record<string, unknown>;
      for (const [index, localDate] of winter.entries()) {
        await trx('occurrence').insert({ ...model, id: `w${index}`, localDate });
        await trx('seat').insert({ id: `ws${index}`, occurrenceId: `w${index}`, studentId: 'ada', enrolmentId });
      }
    });
    const { runId } = await preview({ period: 'winter', dueOn: '2027-01-15' });
    expect(await itemOf(runId)).toMatchObject({ changeKind: 'changed', changeText: '11 lessons instead of 15', totalMinor: 46_200, lastTotalMinor: 63_000 });
  });
});

describe('what the database refuses', () => {
  beforeEach(async () => {
    await vale();
    await release((await preview()).runId);
  });
  it.each([
    ['an issued invoice', (trx: Knex) => trx('invoice').update({ label: 'x' }), 'invoice_fixed'],
    ['its deletion', (trx: Knex) => trx('invoice').delete(), 'invoice_fixed'],
    ['a line', (trx: Knex) => trx('invoice_line').update({ netMinor: 1 }), 'invoice_fixed'],
    ['a step', (trx: Knex) => trx('line_step').delete(), 'invoice_fixed'],
    ['a share', (trx: Knex) => trx('invoice_share').update({ amountMinor: 1 }), 'invoice_fixed'],
    ['an instalment', (trx: Knex) => trx('instalment').update({ dueOn: '2030-01-01' }), 'invoice_fixed'],
    ['the books', (trx: Knex) => trx('journal_line').update({ debitMinor: 1 }), 'journal_fixed'],
    ['a number out of turn', (trx: Knex) => trx('number_series').update({ nextNo: 9 }), 'number_gap'],
    ['a released run', (trx: Knex) => trx('tuition_run').update({ label: 'x' }), 'run_fixed'],
  ])('%s', async (_name, attempt, code) => {
    await expect(attempt(db)).rejects.toThrow(code);
  });
});
