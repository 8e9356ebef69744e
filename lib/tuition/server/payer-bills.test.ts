import { randomUUID } from 'node:crypto';
import type { Knex } from 'knex';
import { beforeEach, describe, expect, it } from 'vitest';
import { insertPercentSplit } from '@/db/families';
import { issueInvoice } from '@/db/invoices';
import { takeNumber } from '@/db/number-series';
import { transaction } from '@/db/transaction';
import { findTuitionRun } from '@/db/tuition-runs';
import type { Context } from '@/lib/server/context';
import { enrolled, lanternMoney, scholarship } from '@/tests/factories/lantern-money';
import { lanternStreet } from '@/tests/factories/lantern-street';
import { contextOf } from '@/tests/support/context';
import { freshDb } from '@/tests/support/fresh-db';
import { buildBill } from '../bill';
import { payerBills, payerInvoice } from './payer-bills';
import { previewTuitionRun } from './preview-tuition-run';
import { releaseTuitionRun } from './release-tuition-run';
import { familyBalance, invoiceList, paymentList, staffInvoice } from './staff-invoice';
import { previewDeskPayment, takeDeskPayment } from './take-desk-payment';

const NOW = Date.UTC(2026, 8, 1, 12) / 1000;
const school = { zone: 'America/New_York', currency: 'USD', locale: 'en-US' };
let db: Knex;
const as = (role: 'owner' | 'desk' | 'guardian' | 'teacher' | 'student', over: object = {}): Context => contextOf(db, role, { now: NOW, school, ...over });
const noor = () => as('guardian', { personId: 'noor', payerIds: ['payer-noor'], studentIds: ['ben'] });
const sam = () => as('guardian', { personId: 'sam', payerIds: ['payer-sam'], studentIds: ['ben'] });

beforeEach(async () => {
  db = freshDb();
  await lanternStreet(db);
  await lanternMoney(db);
});

const take = (over: object = {}) => takeDeskPayment({ payerId: 'payer-noor', amount: '500.00', method: 'cash', receivedOn: '2026-09-01', note: '', requestKey: randomUUID(), ...over }, as('desk', { personId: 'pat' }));

async function bill(label: string, dueOn: string, grossMinor: number): Promise<void> {
  await transaction(db, async (trx) => {
    const worked = buildBill({
      lines: [{ chargeKind: 'tuition', productId: null, enrolmentId: null, studentId: 'ada', text: label, quantity: 1, unitMinor: grossMinor, grossMinor, taxClass: 'tuition', accountCode: 'income', serviceFrom: null, serviceTo: null, explain: [], isDiscountable: false, seatIds: [] }],
      discountRules: [], awards: [], discountMode: 'one_after_other', taxRules: [{ taxClass: 'tuition', treatment: 'exempt', rateBp: 0, reason: 'private tuition' }], taxMode: 'exclusive',
      splitRules: [], defaultPayerId: 'payer-noor', plan: { count: 1, firstDueOn: dueOn, depositBp: 0, movesToWorkingDay: false }, words: { currency: 'USD', locale: 'en-US' },
    });
    const invoice = { id: label, legalEntityId: 'lantern', familyId: 'vale', tuitionRunId: null, label, ...(await takeNumber(trx, 'lantern', 'invoice')), issuedOn: '2026-08-01', dueOn, currency: 'USD', sellerJson: '{}', createdBy: null };
    await issueInvoice(trx, { invoice, bill: worked, payers: new Map(), newId: randomUUID });
  });
}

describe('S20 a payment of 500.00 at the desk', () => {
  beforeEach(async () => {
    await bill('C', '2026-11-01', 16_800);
    await bill('A', '2026-09-01', 12_000);
    await bill('B', '2026-10-01', 38_800);
    const [instalment]: { id: string }[] = await db('instalment as n').join('invoice_share as s', 's.id', 'n.shareId').where('s.invoiceId', 'B').select('n.id');
    await db('late_fee').insert({ id: 'fee', instalmentId: instalment?.id, payerId: 'payer-noor', seqNo: 1, computedOn: '2026-10-09', baseMinor: 38_800, amountMinor: 1000, sentence: 'late' });
  });

  it('settles A, then 380.00 of B; 186.00 stays open, no credit', async () => {
    const before = await previewDeskPayment({ payerId: 'payer-noor', amount: '500' }, as('desk'));
    expect(before).toMatchObject({ openMinor: 68_600 });
    const taken = await take();
    expect(taken).toMatchObject({ receiptNo: 'L-R00001', steps: ['$120.00 for invoice L-00002, settled', '$380.00 for invoice L-00003, $8.00 still open', 'Still open: $186.00'] });
    expect(before.steps).toEqual(taken.steps);
    const [noorBalance] = (await familyBalance({ familyId: 'vale' }, as('desk'))).payers;
    expect(noorBalance).toMatchObject({ openMinor: 17_600, creditMinor: 0 });
    expect((await invoiceList(as('owner'))).map(({ label, openMinor, state }) => [label, openMinor, state])).toEqual([['B', 800, 'part_paid'], ['A', 0, 'paid'], ['C', 16_800, 'open']]);
  });

  it('the same form sent fifty times at once takes it once', async () => {
    const results = await Promise.all(Array.from({ length: 50 }, () => take({ requestKey: 'the-same-form' })));
    expect(new Set(results.map(({ receiptNo }) => receiptNo))).toEqual(new Set(['L-R00001']));
    expect(await paymentList(as('desk'))).toHaveLength(1);
    expect(await db('outbox').where({ topic: 'receipt' })).toHaveLength(1);
  });

  it('keeps what is too much as credit', async () => {
    await take({ amount: '1.000,00' });
    const [noorBalance] = (await familyBalance({ familyId: 'vale' }, as('desk'))).payers;
    expect(noorBalance).toMatchObject({ openMinor: 0, creditMinor: 100_000 - 68_600 });
  });

  it.each([
    ['amount', { amount: 'a lot' }], ['amount', { amount: '0' }], ['amount', { amount: '-5' }], ['amount', { amount: '1.0055' }], ['amount', { amount: '12.345' }], ['receivedOn', { receivedOn: '2026-09-02' }], ['receivedOn', { receivedOn: '2025-01-01' }],
  ])('says what is wrong with the %s of %j', async (field, over) => {
    await expect(take(over)).rejects.toMatchObject({ code: 'invalid', fields: { [field]: [expect.any(String)] } });
    expect(await db('payment')).toEqual([]);
  });

  it('the database refuses more than the source, the target or the credit', async () => {
    await take();
    await take({ amount: '300' });
    await bill('D', '2026-12-01', 5000);
    const [first, second]: { id: string }[] = await db('payment').orderBy('receiptNo').select('id');
    const [target]: { id: string }[] = await db('instalment as n').join('invoice_share as s', 's.id', 'n.shareId').where('s.invoiceId', 'D').select('n.id');
    const allocation = { id: 'x', payerId: 'payer-noor', instalmentId: target?.id, amountMinor: 1, madeOn: '2026-09-01' };
    await expect(db('allocation').insert({ ...allocation, paymentId: first?.id })).rejects.toThrow('over_source');
    await expect(db('allocation').insert({ ...allocation, paymentId: second?.id, amountMinor: 5001 })).rejects.toThrow('over_target');
    await expect(db('allocation').insert({ ...allocation, paymentId: second?.id, amountMinor: 11_401 })).rejects.toThrow(/over_/);
    const refund = { id: 'r', legalEntityId: 'lantern', payerId: 'payer-noor', paymentId: second?.id, method: 'cash' };
    await expect(db('refund').insert({ ...refund, amountMinor: 11_401 })).rejects.toThrow('over_credit');
    await take({ amount: '60' });
    const [third]: { id: string }[] = await db('payment').where({ amountMinor: 6000 }).select('id');
    await expect(db('refund').insert({ ...refund, paymentId: third?.id, amountMinor: 6001 })).rejects.toThrow('refund_over_payment');
    await expect(db('refund').insert({ ...refund, paymentId: third?.id, amountMinor: 6000 })).resolves.toBeDefined();
    await expect(db('payment').update({ amountMinor: 1 })).rejects.toThrow('payment_fixed');
    await expect(db('allocation').delete()).rejects.toThrow('allocation_fixed');
  });
});

describe('S16 the walls between payers', () => {
  beforeEach(async () => {
    await transaction(db, async (trx) => {
      await insertPercentSplit(trx, { id: 's1', familyId: 'vale', chargeKind: 'tuition', parts: [{ payerId: 'payer-noor', bp: 6000 }, { payerId: 'payer-sam', bp: 4000 }] });
      await insertPercentSplit(trx, { id: 's2', familyId: 'vale', chargeKind: '*', parts: [{ payerId: 'payer-sam', bp: 10_000 }] });
    });
    await scholarship(db, 'ben', 2500);
    await enrolled(db, { studentId: 'ben', dates: ['2026-09-15', '2026-09-22', '2026-09-29'], startsOn: '2026-09-15' });
    const { runId } = await previewTuitionRun({ kind: 'term', period: 'autumn', dueOn: '2026-09-15', instalments: 2, depositPercent: 0 }, as('owner', { personId: 'ruth' }));
    await releaseTuitionRun({ runId, controlTotalMinor: (await findTuitionRun(db, runId))?.controlTotalMinor ?? -1 }, as('owner', { personId: 'ruth' }));
    await take({ payerId: 'payer-sam', amount: '10.11' });
  });
  const invoiceId = async (): Promise<string> => {
    const rows: { id: string }[] = await db('invoice').select('id');
    return rows[0]!.id;
  };
  /** Tuition 126.00 − 25 % = 94.50: Noor 56.70, Sam 37.80 and the registration of 35.00. */
  const SAMS = /sam|72\.80|7280|37\.80|3780|10\.11|1011|registration|3500|35\.00|40 %/i;
  const NOORS = /noor|56\.70|5670|60 %/i;

  it('Noor’s answers hold no trace of Sam’s share, payments or address, and the reverse', async () => {
    const id = await invoiceId();
    const hers = JSON.stringify([await payerBills(noor()), await payerInvoice({ invoiceId: id }, noor())]);
    const his = JSON.stringify([await payerBills(sam()), await payerInvoice({ invoiceId: id }, sam())]);
    expect(hers).toContain('5670');
    expect(his).toContain('7280');
    expect(hers.replaceAll('Lantern Street', '')).not.toMatch(SAMS);
    expect(his).not.toMatch(NOORS);
  });

  it('each owes their own instalments', async () => {
    expect(await payerInvoice({ invoiceId: await invoiceId() }, noor())).toMatchObject({ amountMinor: 5670, openMinor: 5670, state: 'open', instalments: [{ amountMinor: 2835 }, { amountMinor: 2835 }] });
    expect(await payerBills(sam())).toMatchObject({ openMinor: 7280 - 1011, nextDue: { nextDueOn: '2026-09-15' }, payments: [{ amountMinor: 1011, receiptNo: 'L-R00001' }] });
  });

  it('a scholarship is named to the child’s own guardian only', async () => {
    const id = await invoiceId();
    expect(JSON.stringify(await payerInvoice({ invoiceId: id }, noor()))).toContain('Scholarship, 25 %');
    const grandmother = JSON.stringify(await payerInvoice({ invoiceId: id }, as('guardian', { payerIds: ['payer-noor'], studentIds: [] })));
    expect(grandmother).toContain('Agreed reduction: $126.00');
    expect(grandmother).not.toMatch(/scholarship/i);
  });

  it('strangers, teachers and students find nothing', async () => {
    const id = await invoiceId();
    for (const context of [as('guardian', { payerIds: ['payer-x'] }), as('teacher'), as('student')]) {
      await expect(payerInvoice({ invoiceId: id }, context)).rejects.toMatchObject({ code: 'not_found' });
      await expect(staffInvoice({ invoiceId: id }, context)).rejects.toMatchObject({ code: 'not_found' });
      await expect(familyBalance({ familyId: 'vale' }, context)).rejects.toMatchObject({ code: 'not_found' });
      await expect(invoiceList(context)).rejects.toMatchObject({ code: 'not_found' });
      expect(await payerBills(context)).toMatchObject({ bills: [], payments: [], openMinor: 0 });
    }
    await expect(paymentList(as('teacher'))).rejects.toMatchObject({ code: 'not_found' });
    await expect(takeDeskPayment({ payerId: 'payer-sam', amount: '1', method: 'cash', receivedOn: '2026-09-01', note: '', requestKey: 'abcdefgh' }, noor())).rejects.toMatchObject({ code: 'not_found' });
  });

  it('the office sees the whole', async () => {
    const invoice = await staffInvoice({ invoiceId: await invoiceId() }, as('desk'));
    expect(invoice).toMatchObject({ totalMinor: 12_950, familyName: 'Vale', shares: [{ payerName: 'Noor Vale', amountMinor: 5670 }, { payerName: 'Sam Vale', amountMinor: 7280, openMinor: 6269 }] });
    expect(invoice.shares[0]?.parts).toEqual(['Tuition: 60 % of $94.50 = $56.70']);
  });
});
