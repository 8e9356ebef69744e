import type { Knex } from 'knex';
import { describe, expect, it } from 'vitest';
import { lanternMoney } from '@/tests/factories/lantern-money';
import { lanternStreet } from '@/tests/factories/lantern-street';
import { contextOf } from '@/tests/support/context';
import { freshDb } from '@/tests/support/fresh-db';
import { setPrice, setTax } from './price-list';

async function house() {
  const db = freshDb();
  await lanternStreet(db);
  await lanternMoney(db);
  return db;
}
const owner = (db: Knex) => contextOf(db, 'owner', { personId: 'noor' });
const lesson = (amount: string, validFrom: string) => ({ productId: 'lesson', lengthMinutes: 45, amount, validFrom });
const prices = (db: Knex) => db('price').where({ productId: 'lesson', lengthMinutes: 45 }).orderBy('validFrom').select('amountMinor', 'validFrom', 'validTo');
const taxes = (db: Knex) => db('tax_rate').where({ legalEntityId: 'lantern', taxClass: 'tuition' }).orderBy('validFrom').select('treatment', 'validFrom', 'validTo');

describe('a price from a day on', () => {
  it('ends the one before, and ends itself where a later one is planned already', async () => {
    const db = await house();
    await setPrice(lesson('70', '2027-09-01'), owner(db));
    await setPrice(lesson('65', '2027-01-01'), owner(db));
    expect(await prices(db)).toEqual([
      { amountMinor: 6000, validFrom: '2026-01-01', validTo: '2027-01-01' }, { amountMinor: 6500, validFrom: '2027-01-01', validTo: '2027-09-01' }, { amountMinor: 7000, validFrom: '2027-09-01', validTo: null },
    ]);
  });
  it('set again for the same day takes its place and keeps the neighbours', async () => {
    const db = await house();
    await setPrice(lesson('70', '2027-09-01'), owner(db));
    await setPrice(lesson('65', '2027-01-01'), owner(db));
    await setPrice(lesson('66.50', '2027-01-01'), owner(db));
    expect(await prices(db)).toMatchObject([{ validTo: '2027-01-01' }, { amountMinor: 6650, validTo: '2027-09-01' }, { amountMinor: 7000 }]);
  });
  it('is the owner’s to set, and an amount that is none is refused', async () => {
    const db = await house();
    await expect(setPrice(lesson('70', '2027-01-01'), contextOf(db, 'desk'))).rejects.toMatchObject({ code: 'forbidden' });
    await expect(setPrice(lesson('much', '2027-01-01'), owner(db))).rejects.toMatchObject({ code: 'invalid' });
    expect(await prices(db)).toHaveLength(1);
  });
});

it('a tax from a day on goes between the ones that are there, too', async () => {
  const db = await house();
  const taxed = (validFrom: string) => ({ taxClass: 'tuition', treatment: 'taxed' as const, ratePercent: 9, reason: '', validFrom });
  await setTax(taxed('2027-09-01'), owner(db));
  await setTax(taxed('2027-01-01'), owner(db));
  expect(await taxes(db)).toEqual([{ treatment: 'exempt', validFrom: '2026-01-01', validTo: '2027-01-01' }, { treatment: 'taxed', validFrom: '2027-01-01', validTo: '2027-09-01' }, { treatment: 'taxed', validFrom: '2027-09-01', validTo: null }]);
});
