import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { divideRounded, percentOf, ratioOf, splitByWeights, sumOf } from '@/lib/money';
import { bucketOf } from '@/lib/tuition/ageing';
import { allocate, type OpenItem } from '@/lib/tuition/allocation';
import { instalmentsOf } from '@/lib/tuition/instalments';
import { balanceOf, journalOfCreditNote, journalOfEarning, journalOfInvoice, journalOfPayment, journalOfRefund, type JournalLine } from '@/lib/tuition/journal';
import { splitByDays } from '@/lib/tuition/proration';
import { lineNet, taxOf, taxPerLine, type TaxedLine } from '@/lib/tuition/tax';

const words = { currency: 'EUR', locale: 'en-IE' };
const taxed = (netMinor: number, rateBp: number): TaxedLine => ({ netMinor, treatment: 'taxed', rateBp, reason: '' });
const exempt = (netMinor: number): TaxedLine => ({ netMinor, treatment: 'exempt', rateBp: 0, reason: 'private tuition' });
const totalsOf = (lines: TaxedLine[]) => taxOf(lines, words).value;

/** Source: the official EN 16931 validation artefacts (ConnectingEurope/eInvoicing-EN16931): UBL examples and BR-CO rules. */
describe('tax by rate group', () => {
  it('B01 example 1: 183.23 at 6 % and 46.37 at 21 %', () => {
    const sixes = splitByWeights(18_323, Array<number>(16).fill(1)).map((net) => taxed(net, 600));
    const others = splitByWeights(4637, [1, 1, 1, 1]).map((net) => taxed(net, 2100));
    const totals = totalsOf([...sixes, ...others]);
    expect(totals.groups.map(({ taxMinor }) => taxMinor)).toEqual([1099, 974]);
    expect([totals.netMinor, totals.taxMinor, totals.totalMinor]).toEqual([22_960, 2073, 25_033]);
  });

  it('B02 example 2: 365.125 rounds up; an allowance and a charge; exempt; prepaid', () => {
    const totals = totalsOf([
      taxed(127_300, 2500), taxed(-396, 1500), taxed(496, 1500), exempt(-2500), taxed(18_750, 2500), taxed(-10_000, 2500), taxed(10_000, 2500),
    ]);
    expect(totals.groups.map(({ netMinor, taxMinor }) => [netMinor, taxMinor])).toEqual([[146_050, 36_513], [100, 15], [-2500, 0]]);
    expect(totals.taxMinor).toBe(36_528);
    expect(totals.totalMinor).toBe(180_178);
    expect(totals.totalMinor - 100_000).toBe(80_178);
  });

  it('B03 example 3: 2005.00', () => {
    const totals = totalsOf([taxed(80_000, 2500), taxed(80_000, 1000), taxed(10_000, 2500)]);
    expect(totals.groups.map(({ taxMinor }) => taxMinor)).toEqual([22_500, 8000]);
    expect(totals.totalMinor).toBe(200_500);
  });

  it('B04 example 5: gross 4675.00, prepaid 2337.50, due 2337.50', () => {
    const gross: OpenItem = { id: 'invoice', kind: 'instalment', label: 'invoice', dueOn: '2026-01-15', numberNo: 1, openMinor: 467_500 };
    expect(allocate(233_750, [gross], words).steps.at(-1)).toBe('Still open: €2,337.50');
  });

  it('B05 example 8: price per base quantity', () => {
    expect(lineNet({ quantity: 132, priceTenThousandths: 152_400, baseQuantity: 12 })).toBe(16_764);
    const totals = totalsOf([taxed(16_764, 2100), taxed(90_891 - 16_764, 2100)]);
    expect([totals.taxMinor, totals.totalMinor]).toEqual([19_087, 109_978]);
  });

  it('B06 a unit price keeps four decimals, the line two', () => {
    const net = lineNet({ quantity: 100, priceTenThousandths: 1212 });
    const totals = totalsOf([taxed(net, 2500)]);
    expect([net, totals.taxMinor, totals.totalMinor]).toEqual([1212, 303, 1515]);
  });

  it('B07 an exempt credit note has no tax', () => expect(totalsOf([exempt(10_011)])).toMatchObject({ taxMinor: 0, totalMinor: 10_011 }));

  it('B08 the totals are sums (BR-CO-10 to -17), and the parts of the lines add up to the groups', () => {
    fc.assert(fc.property(fc.array(fc.record({ netMinor: fc.integer({ min: -50_000, max: 500_000 }), rateBp: fc.constantFrom(0, 500, 800, 1350, 2300) }), { minLength: 1, maxLength: 12 }), (rows) => {
      const lines = rows.map(({ netMinor, rateBp }) => taxed(netMinor, rateBp));
      const totals = totalsOf(lines);
      expect(totals.netMinor).toBe(sumOf(lines.map(({ netMinor }) => netMinor)));
      for (const group of totals.groups) expect(group.taxMinor).toBe(percentOf(group.netMinor, group.rateBp));
      expect(sumOf(taxPerLine(lines, totals))).toBe(totals.taxMinor);
    }));
  });

  it('B09 an included tax is taken out of the price, which stays what was promised', () => {
    const lines = [taxed(2646, 800), taxed(999, 800)];
    const totals = taxOf(lines, words, 'inclusive').value;
    expect(totals.totalMinor).toBe(3645);
    expect(totals.taxMinor).toBe(270);
    expect(sumOf(taxPerLine(lines, totals, 'inclusive'))).toBe(270);
  });

  it('B11 an exempt line must say why (BR-E-10)', () => {
    expect(() => totalsOf([{ netMinor: 100, treatment: 'exempt', rateBp: 0, reason: ' ' }])).toThrow(RangeError);
  });
});

/** Source: own arithmetic of the check list, rows B15 to B25. */
describe('rounding and splitting', () => {
  it.each([[1, 1], [3, 2], [5, 3], [7, 4], [-1, -1], [-5, -3]])('B15 %i/2 is %i', (halves, rounded) => expect(divideRounded(halves, 2)).toBe(rounded));
  it('B16 the traps of binary fractions do not reach us', () => {
    expect(1.005 * 100).not.toBe(100.5);
    expect(ratioOf(1005, 100, 1000)).toBe(101);
    expect(divideRounded(2675, 10)).toBe(268);
  });
  it.each([
    [100, [1, 1, 1], [34, 33, 33]], [1000, [3, 3, 1], [429, 428, 143]], [5, [1, 2, 3, 4], [1, 1, 1, 2]], [101, [50, 50], [51, 50]],
    [24_000, [1, 1, 1, 1, 1, 1, 1], [3429, 3429, 3429, 3429, 3428, 3428, 3428]], [-100, [1, 1, 1], [-34, -33, -33]], [100, [0, 1, 2], [0, 33, 67]],
  ])('B17 %i over %j', (total, weights, parts) => expect(splitByWeights(total, weights)).toEqual(parts));
  it('B19 three of four lessons left of 180.00', () => expect(ratioOf(18_000, 3, 4)).toBe(13_500));
  it('B20 both halves of a month add up', () => expect(splitByDays(19_999, [10, 21])).toEqual([6451, 13_548]));
  it('B21 a price per hour', () => expect([ratioOf(3250, 45, 60), ratioOf(3250, 50, 60)]).toEqual([2438, 2708]));
  it('B24 three instalments of 1000.00', () => {
    const plan = { count: 3, firstDueOn: '2026-01-15', depositBp: 0, movesToWorkingDay: false };
    expect(instalmentsOf(100_000, plan, words).value.map(({ amountMinor }) => amountMinor)).toEqual([33_334, 33_333, 33_333]);
  });
  it('B25 due dates are counted from the anchor', () => {
    const plan = { count: 5, firstDueOn: '2026-01-31', depositBp: 0, movesToWorkingDay: false };
    expect(instalmentsOf(500, plan, words).value.map(({ dueOn }) => dueOn)).toEqual(['2026-01-31', '2026-02-28', '2026-03-31', '2026-04-30', '2026-05-31']);
  });
});

it.each([[0, 'not_due'], [1, 'to_30'], [30, 'to_30'], [31, 'to_60'], [60, 'to_60'], [61, 'to_90'], [90, 'to_90'], [91, 'over_90'], [-5, 'not_due']])('B26 %i days past due: %s', (days, bucket) => {
  expect(bucketOf(days)).toBe(bucket);
});

const THREE: OpenItem[] = [['a', '2026-01-15', 12_000], ['b', '2026-02-15', 8000], ['c', '2026-03-15', 8000]].map(([id, dueOn, openMinor]) =>
  ({ id: String(id), kind: 'instalment', label: String(id), dueOn: String(dueOn), numberNo: 1, openMinor: Number(openMinor) }));

describe('payments', () => {
  it('B27 150.00 over three invoices', () => {
    expect(allocate(15_000, THREE, words).value.allocations.map(({ itemId, amountMinor }) => [itemId, amountMinor])).toEqual([['a', 12_000], ['b', 3000]]);
  });
  it('B28 300.00: 20.00 is left as credit', () => {
    const { allocations, creditMinor } = allocate(30_000, THREE, words).value;
    expect([...allocations.map(({ amountMinor }) => amountMinor), creditMinor]).toEqual([12_000, 8000, 8000, 2000]);
  });
  it('allocations and credit add up to the money, and nothing is settled twice', () => {
    fc.assert(fc.property(fc.integer({ min: 1, max: 60_000 }), (amount) => {
      const { allocations, creditMinor } = allocate(amount, THREE, words).value;
      expect(sumOf(allocations.map(({ amountMinor }) => amountMinor)) + creditMinor).toBe(amount);
      for (const { itemId, amountMinor } of allocations) expect(amountMinor).toBeLessThanOrEqual(THREE.find(({ id }) => id === itemId)?.openMinor ?? 0);
    }));
  });
});

/** Balance of one account over the whole ledger: debits less credits. */
const accountOf = (lines: JournalLine[], code: string) => balanceOf(lines.filter(({ accountCode }) => accountCode === code));

it('B29 a month in the ledger', () => {
  const ledger = [
    ...journalOfInvoice({ totalMinor: 24_000, taxMinor: 0, lines: [{ chargeKind: 'tuition', accountCode: 'income', netMinor: 24_000 }] }),
    ...journalOfPayment({ amountMinor: 10_000, allocatedMinor: 10_000, isCash: false }),
    ...journalOfCreditNote({ netMinor: 6000, taxMinor: 0 }),
    ...journalOfEarning(9000),
  ];
  expect(['receivable', 'bank', 'deferred_tuition', 'tuition_income'].map((code) => accountOf(ledger, code))).toEqual([8000, 10_000, -9000, -9000]);
  expect(balanceOf(ledger)).toBe(0);
});

it('B30 an overpayment of 20.00 paid back', () => {
  const ledger = [...journalOfPayment({ amountMinor: 30_000, allocatedMinor: 28_000, isCash: false }), ...journalOfRefund(2000)];
  expect(accountOf(ledger, 'customer_credit')).toBe(0);
  expect(accountOf(ledger, 'bank')).toBe(28_000);
  expect(balanceOf([...ledger, ...journalOfInvoice({ totalMinor: 28_000, taxMinor: 0, lines: [{ chargeKind: 'tuition', accountCode: 'income', netMinor: 28_000 }] })])).toBe(0);
});
