import type { Knex } from 'knex';
import { beforeEach, describe, expect, it } from 'vitest';
import { enrolled, lanternMoney } from '@/tests/factories/lantern-money';
import { lanternPay } from '@/tests/factories/lantern-pay';
import { lanternStreet } from '@/tests/factories/lantern-street';
import { contextOf } from '@/tests/support/context';
import { freshDb } from '@/tests/support/fresh-db';
import type { Context } from '@/lib/server/context';
import { beginRateSchema } from '../rate-schema';
import { beginRate, readRates } from './pay-rates';
import { workOutPay } from './work-out-pay';

let db: Knex;
let owner: Context;
beforeEach(async () => {
  db = freshDb();
  await lanternStreet(db);
  await lanternMoney(db);
  await lanternPay(db);
  owner = contextOf(db, 'owner', { personId: 'ruth', school: { zone: 'America/New_York', currency: 'USD', locale: 'en-US' } });
});
const TYPED = { engagementId: 'engagement-mara', workType: 'lesson', lessonTypeId: '', lengthMinutes: 30, seatsFrom: null, seatsTo: null, per: 'lesson', amount: '23,50', validFrom: '2026-12-01' } as const;
const begin = (over: Partial<Record<keyof typeof TYPED, unknown>> = {}) => beginRate(beginRateSchema.parse({ ...TYPED, ...over }), owner);
const halfHours = async () => (await readRates(owner)).teachers.find(({ personId }) => personId === 'mara')!.rates.filter(({ workType, lengthMinutes }) => workType === 'lesson' && lengthMinutes === 30);

describe('a new rate from a day on', () => {
  it('ends the one before, and lessons are paid by the rate of their day', async () => {
    await begin();
    expect((await halfHours()).map(({ amountMinor, validFrom, validTo }) => [amountMinor, validFrom, validTo])).toEqual([[2350, '2026-12-01', null], [2100, '2026-01-01', '2026-12-01']]);
    expect(await db('audit').orderBy('seq', 'desc').first('sentence', 'tableName')).toEqual({ sentence: 'Mara, Lesson, 30 min: $23.50 from December 1 2026.', tableName: 'pay_rate' });
    await enrolled(db, { studentId: 'ada', familyId: 'vale', teacherId: 'mara', dates: ['2026-11-24', '2026-12-01'] });
    await db('seat').update({ attendance: 'present', markedAt: 1, rowVersion: 2 });
    const lines = await workOutPay(db, { startsOn: '2026-11-01', endsOn: '2026-12-31', legalEntityId: 'lantern', engagementKind: 'employee' }, { now: Date.UTC(2027, 0, 1) / 1000, words: { currency: 'USD', locale: 'en-US' } });
    expect(lines.map(({ localDate, amountMinor }) => [localDate, amountMinor])).toEqual([['2026-11-24', 2100], ['2026-12-01', 2350]]);
  });
  it('the database refuses two on one day, in a sentence that names the other', async () => {
    await begin();
    for (const validFrom of ['2026-12-01', '2026-11-20']) {
      await expect(begin({ validFrom, amount: '25' })).rejects.toMatchObject({ code: 'conflict', message: 'There is a rate for exactly this from December 1 2026 already, and two cannot hold on one day. Choose a later day.', fields: { validFrom: ['Choose a later day.'] } });
    }
    expect((await halfHours()).map(({ amountMinor, validTo }) => [amountMinor, validTo])).toEqual([[2350, null], [2100, '2026-12-01']]);
  });
  it('a rate for one lesson type stands beside the one for any', async () => {
    await begin({ lessonTypeId: 'make_up' });
    expect((await halfHours()).map(({ lessonTypeLabel, validTo }) => [lessonTypeLabel, validTo])).toEqual([[null, null], [expect.any(String), null]]);
    await expect(begin({ workType: 'group', lessonTypeId: 'make_up' })).rejects.toMatchObject({ code: 'invalid', fields: { lessonTypeId: ['Choose a lesson type from the list.'] } });
  });
  it('does not begin on a day whose pay is closed', async () => {
    await db('pay_period').insert({ id: 'october', legalEntityId: 'lantern', engagementKind: 'employee', label: 'October', startsOn: '2026-10-01', endsOn: '2026-10-31' });
    await db('pay_run').insert({ id: 'run', payPeriodId: 'october', state: 'open' });
    await db('pay_line').insert({ id: 'line', payRunId: 'run', engagementId: 'engagement-mara', kind: 'lesson', lineKey: 'x', localDate: '2026-10-06', text: 'x', amountMinor: 1 });
    await db('pay_run').where({ id: 'run' }).update({ state: 'closed', snapshotHash: 'x', closedAt: 1 });
    await expect(begin({ validFrom: '2026-10-31' })).rejects.toMatchObject({ code: 'conflict', message: expect.stringContaining('Pay up to October 31 2026 is closed and stays as it is.') as string });
    await begin({ validFrom: '2026-11-01' });
    await begin({ engagementId: 'engagement-leo', validFrom: '2026-10-01' });
  });
  it.each(['12.345', '1,234', 'forty', '-3', '21.5.0'])('%j is no amount', async (amount) => {
    await expect(begin({ amount })).rejects.toMatchObject({ code: 'invalid', fields: { amount: [expect.stringContaining('Write it')] } });
    expect(await halfHours()).toHaveLength(1);
  });
  it('a teacher who is not there, or has left, is not found', async () => {
    await db('engagement').where({ id: 'engagement-mara' }).update({ endsOn: '2026-11-01' });
    await expect(begin()).rejects.toMatchObject({ code: 'not_found' });
  });
});

it.each([[{ workType: 'meeting', per: 'lesson' }, 'per'], [{ workType: 'group', seatsFrom: 6, seatsTo: 4 }, 'seatsTo'], [{ workType: 'group', seatsTo: 4 }, 'seatsTo'], [{ workType: 'mileage' }, 'workType'], [{ lengthMinutes: 2 }, 'lengthMinutes']])('%j is refused on its field', (over, field) => {
  expect(beginRateSchema.safeParse({ ...TYPED, ...over }).error?.issues.map(({ path }) => path.join('.'))).toEqual([field]);
});
it('what a kind of work has no use for does not narrow its rate', () => {
  expect(beginRateSchema.parse({ ...TYPED, workType: 'meeting', per: 'hour', lessonTypeId: 'single', seatsFrom: 2 })).toMatchObject({ lessonTypeId: null, lengthMinutes: null, seatsFrom: null, seatsTo: null });
});
