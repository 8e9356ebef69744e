import fc from 'fast-check';
import { expect, it } from 'vitest';
import { billAddsUp, buildBill, MissingTaxRule, type BillFacts, type DraftLine } from './bill';

const line = (over: Partial<DraftLine>): DraftLine => ({
  chargeKind: 'tuition', productId: null, enrolmentId: null, studentId: 'ada', text: 'Ada: lessons', quantity: 1, unitMinor: 10_000, grossMinor: 10_000,
  taxClass: 'tuition', accountCode: 'income', serviceFrom: null, serviceTo: null, explain: [], isDiscountable: true, seatIds: [], ...over,
});
const facts = (over: Partial<BillFacts>): BillFacts => ({
  lines: [line({})], discountRules: [], awards: [], discountMode: 'one_after_other',
  taxRules: [
    { taxClass: 'tuition', treatment: 'exempt', rateBp: 0, reason: 'private tuition' },
    { taxClass: 'books', treatment: 'taxed', rateBp: 800, reason: '' },
  ],
  taxMode: 'exclusive', splitRules: [], defaultPayerId: 'noor',
  plan: { count: 1, firstDueOn: '2026-10-01', depositBp: 0, movesToWorkingDay: false }, words: { currency: 'EUR', locale: 'en-IE' }, ...over,
});

it('leaves registration and books out of the discounts', () => {
  const rule = { id: 'r', label: 'Family discount', qualifies: 'family', rateBp: 1000, orderNo: 1 } as const;
  const bill = buildBill(facts({ discountRules: [rule], lines: [line({}), line({ chargeKind: 'registration', isDiscountable: false, grossMinor: 3500 }), line({ chargeKind: 'book', taxClass: 'books', isDiscountable: false, grossMinor: 2450 })] }));
  expect(bill.lines.map(({ netMinor, taxMinor }) => [netMinor, taxMinor])).toEqual([[9000, 0], [3500, 0], [2450, 196]]);
  expect(bill.totalMinor).toBe(15_146);
  expect(bill.lines[0]?.explain).toEqual(['Family discount, 10 %: €100.00 − €10.00 = €90.00', 'Exempt from tax: private tuition']);
});

it('keeps the promised price when tax is included', () => {
  const bill = buildBill(facts({ taxMode: 'inclusive', lines: [line({ chargeKind: 'book', taxClass: 'books', isDiscountable: false, grossMinor: 2646 })] }));
  expect([bill.netMinor, bill.taxMinor, bill.totalMinor]).toEqual([2450, 196, 2646]);
  expect(bill.lines[0]?.steps.at(-1)?.afterMinor).toBe(2450);
});

it('does not guess at tax', () => expect(() => buildBill(facts({ lines: [line({ taxClass: 'unknown' })] }))).toThrow(MissingTaxRule));

it('issues a bill of nothing under a scholarship of 100 %', () => {
  const bill = buildBill(facts({ awards: [{ id: 'a', label: 'Scholarship', studentId: 'ada', lineKey: null, rateBp: 10_000 }] }));
  expect(bill).toMatchObject({ totalMinor: 0, shares: [{ payerId: 'noor', amountMinor: 0 }] });
});

it('always adds up: lines, shares, instalments', () => {
  const anyLine = fc.record({ grossMinor: fc.integer({ min: 0, max: 300_000 }), studentId: fc.constantFrom('ada', 'ben'), isBook: fc.boolean() });
  fc.assert(fc.property(fc.array(anyLine, { minLength: 1, maxLength: 8 }), fc.integer({ min: 0, max: 10_000 }), fc.integer({ min: 1, max: 5 }), fc.constantFrom('inclusive' as const, 'exclusive' as const), (rows, bp, count, taxMode) => {
    const lines = rows.map(({ grossMinor, studentId, isBook }) => line({ grossMinor, studentId, isDiscountable: !isBook, ...(isBook ? { chargeKind: 'book', taxClass: 'books' } : {}) }));
    const bill = buildBill(facts({
      lines, taxMode, plan: { count, firstDueOn: '2026-01-31', depositBp: 0, movesToWorkingDay: true },
      discountRules: [{ id: 'c', label: 'Second child', qualifies: 'second_child', rateBp: 1000, orderNo: 1 }, { id: 'm', label: 'Second lesson', qualifies: 'multi_lesson', rateBp: 500, orderNo: 2 }],
      awards: [{ id: 'a', label: 'Scholarship', studentId: 'ben', lineKey: null, rateBp: 2500 }],
      splitRules: [{ kind: 'tuition', method: 'percent', parts: [{ payerId: 'noor', bp }, { payerId: 'sam', bp: 10_000 - bp }] }],
    }));
    expect(billAddsUp(bill)).toBe(true);
    for (const { steps, netMinor, grossMinor } of bill.lines) expect(steps.at(-1)?.afterMinor ?? grossMinor).toBe(netMinor);
  }));
});
