import { randomUUID } from 'node:crypto';
import type { Knex } from 'knex';
import { beforeEach, describe, expect, it } from 'vitest';
import { issueInvoice } from './invoices';
import { takeNumber } from './number-series';
import { buildBill } from '@/lib/tuition/bill';
import { enrolled, lanternMoney, scholarship } from '@/tests/factories/lantern-money';
import { lanternPay } from '@/tests/factories/lantern-pay';
import { lanternStreet } from '@/tests/factories/lantern-street';
import { freshDb } from '@/tests/support/fresh-db';
import { transaction } from './transaction';

/** What the database itself refuses, whatever the program above it does: the invariants of the job map, 1.8, that have a trigger and no test elsewhere. */
let db: Knex;
beforeEach(async () => {
  db = freshDb();
  await lanternStreet(db);
  await lanternMoney(db);
});

const refused = (attempt: PromiseLike<unknown>, code: string) => expect(Promise.resolve(attempt)).rejects.toThrow(code);
const seatOf = async (occurrenceId: string | undefined): Promise<string> => {
  const row = await db<{ id: string; occurrenceId: string }>('seat').where({ occurrenceId: occurrenceId ?? '' }).first('id');
  return row?.id ?? '';
};

async function bill(amountMinor: number): Promise<{ instalmentId: string }> {
  const worked = buildBill({
    lines: [{ chargeKind: 'tuition', productId: null, enrolmentId: null, studentId: 'ada', text: 'Lessons', quantity: 1, unitMinor: amountMinor, grossMinor: amountMinor, taxClass: 'tuition', accountCode: 'income', serviceFrom: null, serviceTo: null, explain: [], isDiscountable: false, seatIds: [] }],
    discountRules: [], awards: [], discountMode: 'one_after_other', taxRules: [{ taxClass: 'tuition', treatment: 'exempt', rateBp: 0, reason: 'private tuition' }], taxMode: 'exclusive', splitRules: [],
    defaultPayerId: 'payer-noor', plan: { count: 1, firstDueOn: '2026-09-15', depositBp: 0, movesToWorkingDay: false }, words: { currency: 'USD', locale: 'en-US' },
  });
  const id = randomUUID();
  await transaction(db, async (trx) => {
    const invoice = { id, legalEntityId: 'lantern', familyId: 'vale', tuitionRunId: null, label: 'Autumn', ...(await takeNumber(trx, 'lantern', 'invoice')), issuedOn: '2026-09-01', dueOn: '2026-09-15', currency: 'USD', sellerJson: '{}', createdBy: null };
    await issueInvoice(trx, { invoice, bill: worked, payers: new Map(), newId: randomUUID });
  });
  const row = await db('instalment as n').join('invoice_share as s', 's.id', 'n.shareId').where('s.invoiceId', id).first<{ id: string }>('n.id');
  return { instalmentId: row.id };
}

async function payment(id: string, amountMinor: number, payerId = 'payer-noor'): Promise<void> {
  await transaction(db, async (trx) => {
    const { sequenceNo } = await takeNumber(trx, 'lantern', 'receipt');
    await trx('payment').insert({ id, legalEntityId: 'lantern', payerId, amountMinor, currency: 'USD', method: 'cash', receivedOn: '2026-09-01', receivedAt: 1, receiptNo: sequenceNo, receiptDocumentNo: id });
  });
}
const allocate = (over: object) => db('allocation').insert({ id: randomUUID(), payerId: 'payer-noor', madeOn: '2026-09-02', ...over });
const refund = (over: object) => db('refund').insert({ id: randomUUID(), legalEntityId: 'lantern', payerId: 'payer-noor', reason: 'Left early', method: 'cash', ...over });

describe('3 allocations and credit', () => {
  it('never exceed what was received, what is due, or what is the payer’s own', async () => {
    const { instalmentId } = await bill(10_000);
    await payment('small', 4000);
    await payment('large', 20_000);
    await payment('sams', 5000, 'payer-sam');
    await refused(allocate({ paymentId: 'small', instalmentId, amountMinor: 4001 }), 'over_source');
    await refused(allocate({ paymentId: 'large', instalmentId, amountMinor: 10_001 }), 'over_target');
    await refused(allocate({ paymentId: 'sams', instalmentId, amountMinor: 1 }), 'over_source');
    await refused(allocate({ payerId: 'payer-sam', paymentId: 'sams', instalmentId, amountMinor: 1 }), 'over_target');
    await allocate({ paymentId: 'small', instalmentId, amountMinor: 4000 });
    await refused(allocate({ paymentId: 'large', instalmentId, amountMinor: 6001 }), 'over_target');
    await allocate({ paymentId: 'large', instalmentId, amountMinor: 6000 });
    expect(await db('payer_credit').where({ payerId: 'payer-noor' }).first('creditMinor')).toEqual({ creditMinor: 14_000 });
  });
  it('are turned back once and never changed or deleted', async () => {
    const { instalmentId } = await bill(10_000);
    await payment('p', 4000);
    await allocate({ paymentId: 'p', instalmentId, amountMinor: 4000 });
    await refused(db('allocation').update({ amountMinor: 1 }), 'allocation_fixed');
    await refused(db('allocation').delete(), 'allocation_fixed');
    await db('allocation').update({ reversedOn: '2026-09-03', reversedReason: 'Wrong invoice' });
    await refused(db('allocation').update({ reversedOn: '2026-09-04' }), 'allocation_fixed');
    await allocate({ paymentId: 'p', instalmentId, amountMinor: 4000 });
  });
});

it('4 refunds never exceed the payment nor the credit that is left', async () => {
  const { instalmentId } = await bill(10_000);
  await payment('p', 4000);
  await payment('other', 9000);
  await refused(refund({ paymentId: 'p', amountMinor: 4001 }), 'refund_over_payment');
  await allocate({ paymentId: 'p', instalmentId, amountMinor: 3000 });
  await allocate({ paymentId: 'other', instalmentId, amountMinor: 7000 });
  await refused(refund({ paymentId: 'p', amountMinor: 3001 }), 'over_credit');
  await refund({ paymentId: 'p', amountMinor: 1000 });
  await refused(db('refund').update({ amountMinor: 1 }), 'refund_fixed');
  await refused(db('refund').delete(), 'refund_fixed');
  await refund({ paymentId: 'other', amountMinor: 2000 });
  expect(await db('payer_credit').where({ payerId: 'payer-noor' }).first('creditMinor')).toEqual({ creditMinor: 0 });
  await refused(refund({ paymentId: 'other', amountMinor: 1 }), 'over_credit');
});

describe('8 make-up credits', () => {
  const CREDIT = { id: 'credit', studentId: 'ada', cause: 'family', minutes: 30, bornOn: '2026-10-06', lastOn: '2026-12-01', countsToCap: 1 };
  async function credit(): Promise<{ inTime: string; alsoInTime: string; tooLate: string }> {
    const { enrolmentId, occurrenceIds } = await enrolled(db, { studentId: 'ada', dates: ['2026-10-06', '2026-12-01', '2026-12-02', '2026-11-24'] });
    const [source = '', inTime = '', tooLate = '', alsoInTime = ''] = await Promise.all(occurrenceIds.map(seatOf));
    await db('make_up_credit').insert({ ...CREDIT, enrolmentId, sourceSeatId: source });
    return { inTime, alsoInTime, tooLate };
  }
  const use = (seatId: string, minutes: number) => db('make_up_use').insert({ id: randomUUID(), creditId: 'credit', seatId, minutes });

  it('are used on their last day and not the day after', async () => {
    const { inTime, tooLate } = await credit();
    await refused(use(tooLate, 30), 'credit_expired');
    await use(inTime, 30);
  });
  it('give no more minutes than they have; a use turned back gives them again', async () => {
    const { inTime, alsoInTime } = await credit();
    await refused(use(inTime, 31), 'credit_overused');
    await use(inTime, 30);
    await refused(use(alsoInTime, 1), 'credit_overused');
    await refused(db('make_up_use').update({ minutes: 1 }), 'credit_use_fixed');
    await db('make_up_use').update({ reversedAt: 1 });
    await use(alsoInTime, 30);
    await refused(db('make_up_use').where({ seatId: inTime }).update({ reversedAt: null }), 'credit_use_fixed');
    await refused(db('make_up_use').delete(), 'credit_use_fixed');
  });
  it('keep each lengthening as it was written', async () => {
    await credit();
    await db('make_up_extension').insert({ id: 'x', creditId: 'credit', oldLastOn: '2026-12-01', newLastOn: '2026-12-08', reason: 'Snow', at: 1 });
    await refused(db('make_up_extension').update({ newLastOn: '2027-01-01' }), 'extension_fixed');
  });
});

it('14 the same outside event is kept once and as it came', async () => {
  const event = { source: 'card', eventId: 'evt-1', type: 'paid', bodySha256: 'x', processedAt: 1 };
  await db('external_event').insert(event);
  await refused(db('external_event').insert(event), 'UNIQUE');
  await refused(db('external_event').update({ effect: 'again' }), 'event_fixed');
  await refused(db('external_event').delete(), 'event_fixed');
});

it('17 guests, performers and staff stay within the person limit of the hall', async () => {
  await db('recital').insert({ id: 'r', title: 'Autumn recital', personLimit: 10, seatCount: 10, staffCount: 2, localDate: '2026-12-05', startMin: 900, hardEndMin: 1080 });
  await db('programme_item').insert({ id: 'i', recitalId: 'r', piece: 'Study', durationSeconds: 120, teacherId: 'mara' });
  await db('item_performer').insert([{ itemId: 'i', personId: 'ada' }, { itemId: 'i', personId: 'ben' }]);
  await db('recital_reply').insert({ id: 'reply', recitalId: 'r', familyId: 'vale', seatsAllowed: 8 });
  await refused(db('recital_reply').update({ seatsGranted: 7 }), 'hall_full');
  await db('recital_reply').update({ seatsGranted: 6 });
  const vale = await db<Record<string, unknown>>('family').where({ id: 'vale' }).first();
  await db('family').insert({ ...vale, id: 'reyes', name: 'Reyes' });
  await refused(db('recital_reply').insert({ id: 'late', recitalId: 'r', familyId: 'reyes', seatsAllowed: 1, seatsGranted: 1 }), 'hall_full');
});

describe('18 a thread about a student under age has a guardian in it, or nobody writes', () => {
  const AT = Date.UTC(2026, 10, 17) / 1000;
  async function thread(studentId: string, members: readonly string[]): Promise<void> {
    await db('relationship').insert([{ id: 'r1', childId: 'ada', adultId: 'noor', kind: 'mother', hasLegalCare: 1 }, { id: 'r2', childId: 'ada', adultId: 'sam', kind: 'other', hasLegalCare: 0 }]);
    await db('thread').insert({ id: 't', aboutStudentId: studentId, title: 'Lessons' });
    await db('thread_member').insert(members.map((personId) => ({ threadId: 't', personId })));
  }
  const write = () => db('message').insert({ id: randomUUID(), threadId: 't', fromId: 'mara', body: 'Well played.', at: AT });

  it('teacher and child alone may not', async () => {
    await thread('ada', ['mara', 'ada']);
    await refused(write(), 'guardian_missing');
  });
  it('an adult without legal care does not count', async () => {
    await thread('ada', ['mara', 'sam']);
    await refused(write(), 'guardian_missing');
  });
  it('with a guardian, and with a grown student, one may', async () => {
    await thread('ada', ['mara', 'ada', 'noor']);
    await write();
    await db('thread').update({ aboutStudentId: 'theo' });
    await db('thread_member').where({ personId: 'noor' }).delete();
    await write();
  });
});

describe('the register', () => {
  it('a lesson has no more seats than its type', async () => {
    const { occurrenceIds: [occurrenceId] } = await enrolled(db, { studentId: 'ada', dates: ['2026-10-06'] });
    await refused(db('seat').insert({ id: 'second', occurrenceId, studentId: 'ben' }), 'seats_full');
  });
  it('a mark does not overwrite another unseen', async () => {
    await enrolled(db, { studentId: 'ada', dates: ['2026-10-06'] });
    await refused(db('seat').update({ attendance: 'present', markedAt: 1 }), 'stale_seat');
    await db('seat').update({ attendance: 'present', markedAt: 1, rowVersion: 2 });
    await refused(db('seat').update({ attendance: 'expected' }), 'stale_seat');
  });
});

describe('one rule at a time', () => {
  it.each([
    ['term', { id: 't', name: 'Second autumn', yearLabel: '2026/27', startsOn: '2026-12-19', endsOn: '2026-12-31' }, { startsOn: '2026-12-20' }, 'term_overlap'],
    ['pay_period', { id: 'p', legalEntityId: 'lantern', engagementKind: 'employee', label: 'Late October', startsOn: '2026-10-31', endsOn: '2026-11-05' }, { startsOn: '2026-11-01' }, 'pay_period_overlap'],
    ['setting_version', { id: 's', key: 'credit.valid_days', valueJson: '60', validFrom: '2026-08-31' }, { validFrom: '2026-09-01' }, 'setting_overlap'],
    ['pay_rule', { id: 'r', kind: 'substitute', valueJson: '{}', validFrom: '2026-06-01' }, { engagementKind: 'contractor' }, 'pay_rule_overlap'],
    ['discount_rule', { id: 'd', code: 'second_child', label: 'Second child', qualifies: 'second_child', rateBp: 1, orderNo: 3, validFrom: '2026-06-01' }, { code: 'other' }, 'discount_overlap'],
  ])('%s', async (table, row, apart, code) => {
    await lanternPay(db);
    await db('pay_period').insert({ id: 'october', legalEntityId: 'lantern', engagementKind: 'employee', label: 'October', startsOn: '2026-10-01', endsOn: '2026-10-31' });
    await db('setting_version').insert({ id: 'first', key: 'credit.valid_days', valueJson: '30', validFrom: '2026-01-01', validTo: '2026-09-01' });
    await refused(db(table).insert(row), code);
    await db(table).insert({ ...row, ...apart });
    await refused(db(table).where({ id: row.id }).update(Object.fromEntries(Object.keys(apart).map((key) => [key, (row as Record<string, unknown>)[key] ?? null]))), code);
  });
  it('a teacher’s rate for one kind of work', async () => {
    await lanternPay(db);
    const rate = await db<Record<string, unknown>>('pay_rate').where({ lengthMinutes: 30, engagementId: 'engagement-mara' }).first();
    await refused(db('pay_rate').insert({ ...rate, id: 'again', validFrom: '2026-08-01' }), 'pay_rate_overlap');
    await db('pay_rate').insert({ ...rate, id: 'hour', lengthMinutes: 75 });
    await refused(db('pay_rate').where({ id: 'hour' }).update({ lengthMinutes: 30 }), 'pay_rate_overlap');
  });
  it('how one class of goods is taxed, and how a family shares one kind of charge', async () => {
    const tax = { legalEntityId: 'lantern', taxClass: 'books', treatment: 'zero', rateBp: 0 };
    await db('tax_rate').insert([{ ...tax, id: 'until', validFrom: '2026-01-01', validTo: '2026-07-01' }, { ...tax, id: 'from', validFrom: '2026-07-01' }]);
    await refused(db('tax_rate').where({ id: 'until' }).update({ validTo: '2026-07-02' }), 'tax_rate_overlap');
    const split = { familyId: 'vale', chargeKind: 'material', method: 'percent', partsJson: JSON.stringify([{ payerId: 'payer-noor', bp: 10_000 }]) };
    await db('split_rule').insert([{ ...split, id: 'until', validFrom: '2026-01-01', validTo: '2026-07-01' }, { ...split, id: 'from', validFrom: '2026-07-01' }]);
    await refused(db('split_rule').where({ id: 'until' }).update({ validTo: null }), 'split_overlap');
    await db('split_rule').where({ id: 'until' }).update({ validTo: '2026-06-01' });
  });
  it('a fund gives no more than it has', async () => {
    await scholarship(db, 'ada', 5000);
    const award = { id: 'more', fundId: 'fund', studentId: 'ben', rateBp: 1000, validFrom: '2026-01-01' };
    await refused(db('scholarship_award').insert({ ...award, committedMinor: 80_001 }), 'fund_exceeded');
    await db('scholarship_award').insert({ ...award, committedMinor: 80_000 });
  });
});

describe('what happened stays as it was written', () => {
  it.each([
    ['consent', { id: 'x', personId: 'ada', givenById: 'noor', purpose: 'photo_wall', answer: 'yes', textVersion: '1', givenAt: 1 }, { answer: 'no' }, 'consent_fixed'],
    ['access_log', { id: 1, at: 1, actorId: 'pat', what: 'opened', aboutId: 'ada' }, { what: 'closed' }, 'log_fixed'],
  ])('%s', async (table, row, change, code) => {
    await db(table).insert(row);
    await refused(db(table).update(change), code);
    await refused(db(table).delete(), code);
  });
  it('enquiry_event', async () => {
    await db('enquiry').insert({ id: 'e', contactName: 'Wren', studentName: 'Wren', contactEmail: 'wren@example.com' });
    await db('enquiry_event').insert({ id: 'x', enquiryId: 'e', at: 1, kind: 'note', text: 'Rang back' });
    await refused(db('enquiry_event').update({ text: 'Never rang' }), 'event_fixed');
    await refused(db('enquiry_event').delete(), 'event_fixed');
  });
  it('enrolment_change', async () => {
    const { enrolmentId } = await enrolled(db, { studentId: 'ada', dates: [] });
    await db('enrolment_change').insert({ id: 'x', enrolmentId, kind: 'start', effectiveOn: '2026-09-08', beforeJson: '{}', afterJson: '{}', at: 1 });
    await refused(db('enrolment_change').update({ afterJson: '{"a":1}' }), 'change_fixed');
    await refused(db('enrolment_change').delete(), 'change_fixed');
  });
});
