import { execFile } from 'node:child_process';
import { randomUUID } from 'node:crypto';
import { promisify } from 'node:util';
import type { Knex } from 'knex';
import { beforeEach, describe, expect, it } from 'vitest';
import { issueInvoice } from '@/db/invoices';
import { takeNumber } from '@/db/number-series';
import { transaction } from '@/db/transaction';
import { findTuitionRun } from '@/db/tuition-runs';
import { buildBill, type Bill } from '@/lib/tuition/bill';
import { previewTuitionRun } from '@/lib/tuition/server/preview-tuition-run';
import { enrolled, lanternMoney } from '@/tests/factories/lantern-money';
import { lanternStreet } from '@/tests/factories/lantern-street';
import { contextOf } from '@/tests/support/context';
import { freshDb } from '@/tests/support/fresh-db';

/** What the database itself refuses, whatever the program above it does: invariants 2 to 6 and 16 of the job map, 1.8. */
let db: Knex;
beforeEach(async () => {
  db = freshDb();
  await lanternStreet(db);
  await lanternMoney(db);
});

const billOf = (grossMinor: number): Bill => buildBill({
  lines: [{ chargeKind: 'tuition', productId: null, enrolmentId: null, studentId: 'ada', text: 'Lessons', quantity: 1, unitMinor: grossMinor, grossMinor, taxClass: 'tuition', accountCode: 'income', serviceFrom: null, serviceTo: null, explain: [], isDiscountable: false, seatIds: [] }],
  discountRules: [], awards: [], discountMode: 'one_after_other', taxRules: [{ taxClass: 'tuition', treatment: 'exempt', rateBp: 0, reason: 'private tuition' }], taxMode: 'exclusive', splitRules: [],
  defaultPayerId: 'payer-noor', plan: { count: 2, firstDueOn: '2026-09-15', depositBp: 0, movesToWorkingDay: false }, words: { currency: 'USD', locale: 'en-US' },
});
const issue = (bill: Bill, over: object = {}) => transaction(db, async (trx) => {
  const number = await takeNumber(trx, 'lantern', 'invoice');
  const invoice = { id: randomUUID(), legalEntityId: 'lantern', familyId: 'vale', tuitionRunId: null, label: 'Autumn', ...number, issuedOn: '2026-09-01', dueOn: '2026-09-15', currency: 'USD', sellerJson: '{}', createdBy: null, ...over };
  await issueInvoice(trx, { invoice, bill, payers: new Map(), newId: randomUUID });
  return invoice.id;
});

describe('an invoice is issued only when everything adds up', () => {
  it.each([
    ['a line too small', (bill: Bill) => { bill.lines[0]!.netMinor -= 1; bill.lines[0]!.grossMinor -= 1; }, 'invoice_does_not_add_up'],
    ['a share too large', (bill: Bill) => { bill.shares[0]!.amountMinor += 1; }, /add_up|over_share/],
    ['an instalment too small', (bill: Bill) => { bill.shares[0]!.instalments[0]!.amountMinor -= 1; }, 'shares_do_not_add_up'],
    ['an instalment too large', (bill: Bill) => { bill.shares[0]!.instalments[0]!.amountMinor += 1; }, 'instalments_over_share'],
    ['a part too small', (bill: Bill) => { bill.shares[0]!.parts[0]!.amountMinor -= 1; }, 'shares_do_not_add_up'],
    ['steps that end elsewhere', (bill: Bill) => { bill.lines[0]!.grossMinor += 1; }, 'steps_do_not_add_up'],
    ['no line at all', (bill: Bill) => { bill.lines = []; }, 'invoice_does_not_add_up'],
  ])('%s', async (_name, spoil, code) => {
    const bill = billOf(10_000);
    spoil(bill);
    await expect(issue(bill)).rejects.toThrow(code);
    expect(await db('invoice')).toEqual([]);
  });
});

describe('B31 numbers', () => {
  it('a transaction that fails leaves no gap', async () => {
    await issue(billOf(1000));
    const bad = billOf(1000);
    bad.lines = [];
    await expect(issue(bad)).rejects.toThrow('invoice_does_not_add_up');
    await issue(billOf(1000));
    expect(await db('invoice').orderBy('sequenceNo').select('sequenceNo', 'documentNo')).toEqual([{ sequenceNo: 1, documentNo: 'L-00001' }, { sequenceNo: 2, documentNo: 'L-00002' }]);
  });
  it('refuses a number that does not follow, and one that was given', async () => {
    await issue(billOf(1000));
    await expect(issue(billOf(1000), { sequenceNo: 5 })).rejects.toThrow('number_gap');
    await expect(issue(billOf(1000), { sequenceNo: 1 })).rejects.toThrow(/number_gap|UNIQUE/);
  });
  it('counts each legal entity by itself', async () => {
    await transaction(db, async (trx) => {
      expect(await takeNumber(trx, 'lantern', 'invoice')).toEqual({ sequenceNo: 1, documentNo: 'L-00001' });
      expect(await takeNumber(trx, 'canal-entity', 'invoice')).toEqual({ sequenceNo: 1, documentNo: 'C-00001' });
      expect(await takeNumber(trx, 'lantern', 'credit_note')).toEqual({ sequenceNo: 1, documentNo: 'L-CN00001' });
    });
  });
});

it('credits never exceed the line or the share, nor name another invoice', async () => {
  const invoiceId = await issue(billOf(10_000));
  const other = await issue(billOf(500));
  const [line]: { id: string }[] = await db('invoice_line').where({ invoiceId }).select('id');
  const [foreign]: { id: string }[] = await db('invoice_line').where({ invoiceId: other }).select('id');
  const [share]: { id: string }[] = await db('invoice_share').where({ invoiceId }).select('id');
  await db('credit_note').insert({ id: 'cn', invoiceId, legalEntityId: 'lantern', reason: 'Left early' });
  const credit = { creditNoteId: 'cn', sentence: 'back' };
  await expect(db('credit_note_line').insert({ id: 'a', invoiceLineId: line?.id, netMinor: 10_001, ...credit })).rejects.toThrow('credit_over_line');
  await expect(db('credit_note_line').insert({ id: 'a', invoiceLineId: foreign?.id, netMinor: 1, ...credit })).rejects.toThrow('credit_foreign_line');
  await db('credit_note_line').insert({ id: 'a', invoiceLineId: line?.id, netMinor: 4000, ...credit });
  await expect(db('credit_note_share').insert({ id: 's', creditNoteId: 'cn', shareId: share?.id, payerId: 'payer-noor', amountMinor: 10_001 })).rejects.toThrow('credit_over_share');
  const number = { state: 'issued', sequenceNo: 1, documentNo: 'L-CN00001', issuedOn: '2026-10-01', netMinor: 4000, totalMinor: 4000 };
  await expect(db('credit_note').where({ id: 'cn' }).update(number)).rejects.toThrow('credit_does_not_add_up');
  await db('credit_note_share').insert({ id: 's', creditNoteId: 'cn', shareId: share?.id, payerId: 'payer-noor', amountMinor: 4000 });
  await db('credit_note').where({ id: 'cn' }).update(number);
  await expect(db('credit_note').where({ id: 'cn' }).update({ reason: 'x' })).rejects.toThrow('credit_note_fixed');
  await expect(db('credit_note_line').delete()).rejects.toThrow('credit_note_fixed');
});

it('books that do not balance are not posted', async () => {
  const entry = { id: 'e', legalEntityId: 'lantern', postedOn: '2026-09-01', documentKind: 'invoice', documentId: 'x', memo: 'm', currency: 'USD' };
  await db('journal_entry').insert(entry);
  await db('journal_line').insert({ entryId: 'e', lineNo: 1, accountCode: 'bank', debitMinor: 5 });
  await expect(db('journal_entry').update({ state: 'posted' })).rejects.toThrow('journal_unbalanced');
});

it('prices, rules and splits of one key do not overlap, and a split is whole and of own payers', async () => {
  await expect(db('price').insert({ id: 'p', productId: 'lesson', lengthMinutes: 30, amountMinor: 1, validFrom: '2026-05-01' })).rejects.toThrow('price_overlap');
  await expect(db('tax_rate').insert({ id: 't', legalEntityId: 'lantern', taxClass: 'tuition', treatment: 'zero', validFrom: '2026-05-01' })).rejects.toThrow('tax_rate_overlap');
  const split = { id: 's', familyId: 'vale', chargeKind: '*', method: 'percent' };
  await expect(db('split_rule').insert({ ...split, partsJson: JSON.stringify([{ payerId: 'payer-noor', bp: 9999 }]) })).rejects.toThrow('split_not_whole');
  await expect(db('split_rule').insert({ ...split, partsJson: JSON.stringify([{ payerId: 'stranger', bp: 10_000 }]) })).rejects.toThrow('split_foreign_payer');
});

it('three processes that release the same run issue each bill once', async () => {
  await enrolled(db, { studentId: 'ada', dates: ['2026-09-15', '2026-09-22'] });
  const now = Date.UTC(2026, 8, 1, 12) / 1000;
  const school = { zone: 'America/New_York', currency: 'USD', locale: 'en-US' };
  const owner = contextOf(db, 'owner', { personId: 'ruth', now, school });
  const { runId } = await previewTuitionRun({ kind: 'term', period: 'autumn', dueOn: '2026-09-15', instalments: 1, depositPercent: 0 }, owner);
  const controlTotalMinor = (await findTuitionRun(db, runId))?.controlTotalMinor ?? -1;
  const [database]: { file: string }[] = await db.raw('PRAGMA database_list');
  const script = ['--conditions=react-server', '--import', 'tsx', 'tests/support/release-in-a-process.ts', database?.file ?? '', runId, String(controlTotalMinor), String(now)];
  const answers = await Promise.all([1, 2, 3].map(() => promisify(execFile)(process.execPath, script)));
  expect(answers.map(({ stdout }) => stdout)).toEqual(['1', '1', '1']);
  expect(await db('invoice')).toHaveLength(1);
  expect(await db('outbox')).toHaveLength(1);
}, 60_000);
