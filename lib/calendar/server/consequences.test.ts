import type { Knex } from 'knex';
import { beforeEach, describe, expect, it } from 'vitest';
import { datedConsequences, houseRulesOn } from '@/db/settings';
import { enrolled, lanternMoney } from '@/tests/factories/lantern-money';
import { lanternPay } from '@/tests/factories/lantern-pay';
import { lanternStreet } from '@/tests/factories/lantern-street';
import { contextOf } from '@/tests/support/context';
import { freshDb } from '@/tests/support/fresh-db';
import { workOutPay } from '@/lib/payroll/server/work-out-pay';
import type { Context } from '@/lib/server/context';
import { readBillingFacts } from '@/lib/tuition/server/billing-facts';
import { familyBillOf } from '@/lib/tuition/server/family-bill';
import { consequenceFormSchema } from '../consequence-schema';
import { CONSEQUENCES, type Consequence } from '../consequences';
import { changeConsequence, readConsequences } from './change-consequence';
import { absenceEffect } from './family-lessons';
import { markAttendance } from './mark-attendance';

const [BEFORE, AFTER] = ['2026-11-24', '2026-12-01'];
const OWN: Consequence = { charged: false, credit: 'free', payBp: { employee: 2500, contractor: 0 }, drawsPackage: false };
const at = (date: string, hour: number) => Date.UTC(Number(date.slice(0, 4)), Number(date.slice(5, 7)) - 1, Number(date.slice(8)), hour) / 1000;

let db: Knex;
let owner: Context;
const seatOn = async (localDate: string): Promise<string> => {
  const [seat]: { id: string }[] = await db('seat as s').join('occurrence as o', 'o.id', 's.occurrenceId').where({ localDate }).select('s.id');
  return seat!.id;
};
const change = (over: Partial<Parameters<typeof changeConsequence>[0]> = {}) => changeConsequence({ mark: 'late_notice', consequence: OWN, validFrom: AFTER, ...over }, owner);

beforeEach(async () => {
  db = freshDb();
  await lanternStreet(db);
  await lanternMoney(db);
  await lanternPay(db);
  await enrolled(db, { studentId: 'ada', familyId: 'vale', teacherId: 'mara', dates: [BEFORE, AFTER], tuitionModel: 'per_lesson' });
  await db('occurrence').update({ plannedTeacherId: 'mara' });
  for (const date of [BEFORE, AFTER]) await db('occurrence').where({ localDate: date }).update({ cancelDeadlineAt: at(date, 12) });
  owner = contextOf(db, 'owner', { personId: 'ruth', school: { zone: 'America/New_York', currency: 'USD' } });
});

describe('a lesson is judged by the table of its own day', () => {
  beforeEach(() => change());
  const markLate = async (date: string) => markAttendance({ seatId: await seatOn(date), attendance: 'away_with_notice', minutesLate: null, toldAt: null, toldVia: 'desk', rowVersion: 1 }, { ...owner, now: at(date, 20), today: date });

  it('the make-up credit', async () => {
    expect((await markLate(BEFORE)).sentence).toBe('No make-up credit for this.');
    expect((await markLate(AFTER)).sentence).toBe('A make-up credit, good until 2027-01-30.');
    expect(await db('make_up_credit').select('bornOn', 'countsToCap', 'state')).toEqual([{ bornOn: AFTER, countsToCap: 0, state: 'live' }]);
  });
  it('the pay', async () => {
    for (const date of [BEFORE, AFTER]) await markLate(date);
    const lines = await workOutPay(db, { startsOn: '2026-11-01', endsOn: '2026-12-31', legalEntityId: 'lantern', engagementKind: 'employee' }, { now: at('2026-12-31', 20), words: { currency: 'USD', locale: 'en-US' } });
    expect(lines.map(({ localDate, shareBp, amountMinor }) => [localDate, shareBp, amountMinor])).toEqual([[BEFORE, 5000, 1050], [AFTER, 2500, 525]]);
  });
  it('the charge of who pays lesson by lesson', async () => {
    for (const date of [BEFORE, AFTER]) await markLate(date);
    const facts = await readBillingFacts(db, { kind: 'term', from: '2026-11-01', to: '2026-12-19', label: 'Autumn' }, { firstDueOn: '2026-12-31', count: 1, depositBp: 0, movesToWorkingDay: false }, { locale: 'en-US', zone: 'America/New_York' });
    const own = facts.enrolments.filter(({ studentId }) => studentId === 'ada');
    const tuition = familyBillOf('vale', own, facts)?.bill?.lines.filter(({ chargeKind }) => chargeKind === 'tuition') ?? [];
    expect(tuition.map(({ quantity, seatIds }) => [quantity, seatIds])).toEqual([[1, [await seatOn(BEFORE)]]]);
  });
  it('what a family is told before it sends an absence', async () => {
    const noor = (date: string) => contextOf(db, 'guardian', { personId: 'noor', studentIds: ['ada'], now: at(date, 13), school: { zone: 'America/New_York' } });
    expect((await absenceEffect({ seatId: await seatOn(BEFORE) }, noor(BEFORE))).sentences).toEqual(['The time to tell us has passed, so no make-up lesson follows.', 'The lesson stays on the bill.']);
    expect((await absenceEffect({ seatId: await seatOn(AFTER) }, noor(AFTER))).sentences).toEqual(['The time to tell us has passed.', '30 minutes to make up, by Saturday 30 January.', 'Where lessons are paid one by one, this one is not charged.']);
  });
});

it.each([['50', 5000], ['62,5', 6250], ['0.01', 1], ['100 %', 10_000], ['100.01', null], ['', null], ['-1', null], ['1.234', null], ['fifty', null]])('%j per cent is %j basis points', (typed, bp) => {
  const read = consequenceFormSchema.safeParse({ mark: 'no_show', charged: true, credit: 'none', employee: typed, contractor: '0', drawsPackage: true, validFrom: AFTER });
  expect(read.data?.consequence.payBp.employee ?? null).toBe(bp);
});

describe('changing the table', () => {
  it('begins on its day, keeps every other mark, and is in the audit in words', async () => {
    await change();
    const rulesOn = async (day: string) => (await houseRulesOn(db, day))['attendance.consequences'];
    expect(await rulesOn('2026-11-30')).toEqual(CONSEQUENCES);
    expect(await rulesOn(AFTER)).toEqual({ ...CONSEQUENCES, late_notice: OWN });
    expect(await db('audit').orderBy('seq', 'desc').first('sentence')).toEqual({ sentence: 'From 1 December 2026, away, told late: not charged, make-up credit outside the cap, pay 25 % employees, 0 % contractors, leaves a package alone.' });
  });
  it('a change from an earlier day than one that is planned runs on into it', async () => {
    await change({ validFrom: '2027-01-11' });
    const noShow = { ...CONSEQUENCES.no_show, payBp: { employee: 0, contractor: 0 } };
    await change({ mark: 'no_show', consequence: noShow, validFrom: AFTER });
    expect((await readConsequences(owner)).map(({ validFrom, validTo, table, approvedByName }) => [validFrom, validTo, table.no_show.payBp.employee, table.late_notice.payBp.employee, approvedByName])).toEqual([
      [AFTER, '2027-01-11', 0, 5000, 'Ruth'], ['2027-01-11', null, 0, 2500, 'Ruth'],
    ]);
  });
  it('twice on one day, the last word holds', async () => {
    await change();
    await change({ consequence: CONSEQUENCES.late_notice });
    expect((await readConsequences(owner)).map(({ table }) => table)).toEqual([CONSEQUENCES]);
  });
  it('never backwards', async () => {
    for (const validFrom of ['2026-11-16', '2026-11-17']) await expect(change({ validFrom })).rejects.toMatchObject({ code: 'invalid', fields: { validFrom: ['Choose a day after today.'] } });
    await expect(change({ mark: 'present', consequence: { ...OWN, credit: 'capped' } })).rejects.toMatchObject({ code: 'invalid', fields: { credit: ['Choose no credit.'] } });
    expect(await readConsequences(owner)).toEqual([]);
  });
  it('a stored table that lacks a mark is refused loudly wherever a lesson is judged', async () => {
    const { no_show, ...lacking } = CONSEQUENCES;
    expect(no_show.payBp.employee).toBe(10_000);
    await db('setting_version').insert({ id: 'broken', key: 'attendance.consequences', valueJson: JSON.stringify(lacking), validFrom: '2026-11-01' });
    await expect(datedConsequences(db)).rejects.toThrow();
    await expect(houseRulesOn(db, BEFORE)).rejects.toThrow();
    await expect(houseRulesOn(db, '2026-10-31')).resolves.toMatchObject({ 'attendance.consequences': CONSEQUENCES });
  });
});
