import { describe, expect, it } from 'vitest';
import { teachingDates } from '@/lib/calendar/term';
import { ageingOf } from '@/lib/tuition/ageing';
import { allocate, type OpenItem } from '@/lib/tuition/allocation';
import { discountLines, type DiscountRule } from '@/lib/tuition/discounts';
import { instalmentsOf, nextWorkingDay } from '@/lib/tuition/instalments';
import { prorateMonth, prorateTerm, type MonthRule } from '@/lib/tuition/proration';
import { splitCharges, splitCredit } from '@/lib/tuition/shares';
import { monthlyFlatFee, settleMonthlyFlat, tuitionByCount } from '@/lib/tuition/term-tuition';
import { trialFeeCredit } from '@/lib/tuition/trial-fee';
import { withdrawalCredit } from '@/lib/tuition/withdrawal';

/** Source: the acceptance scenarios of the job map, Part 3 (Lantern Street School, US dollars). */
const words = { currency: 'USD', locale: 'en-US' };
const AUTUMN = { startsOn: '2026-09-08', endsOn: '2026-12-19' };
const AUTUMN_CLOSED = new Set(['2026-10-12', '2026-11-26', '2026-11-27', '2026-11-28']);
const autumn = (weekday: number, from = AUTUMN.startsOn) => teachingDates(weekday, AUTUMN, AUTUMN_CLOSED).filter((date) => date >= from);

describe('S01 trial fee credited on the first bill', () => {
  const trial = { feeMinor: 2500, creditUntilOn: '2026-10-16' };
  const lessons = autumn(1, '2026-10-19');
  const firstBill = (enrolledOn: string) =>
    tuitionByCount({ lessons: lessons.length, unitMinor: 4200, lengthMinutes: 30 }, words).value + 3500 + trialFeeCredit(trial, enrolledOn, words).value;

  it('leaves nine Mondays', () => expect(lessons).toHaveLength(9));
  it('enrolling on 13 October: 388.00', () => expect(firstBill('2026-10-13')).toBe(38_800));
  it('enrolling on the last day still counts', () => expect(firstBill('2026-10-16')).toBe(38_800));
  it('enrolling on 17 October: 413.00', () => expect(firstBill('2026-10-17')).toBe(41_300));
});

describe('S04 tuition per term by count, and monthly flat', () => {
  it.each([[1, 54_600], [2, 63_000], [4, 58_800]])('weekday %i', (weekday, minor) => {
    expect(tuitionByCount({ lessons: autumn(weekday).length, unitMinor: 4200, lengthMinutes: 30 }, words).value).toBe(minor);
  });
  it.each([[37, 15_540], [32, 13_440]])('%i lessons a year', (lessonsInYear, minor) => {
    expect(monthlyFlatFee({ lessonsInYear, unitMinor: 4200, months: 10 }, words).value).toBe(minor);
  });
  it('says how', () => {
    expect(tuitionByCount({ lessons: 4, unitMinor: 3000, lengthMinutes: 45 }, { currency: 'EUR', locale: 'en-IE' }).steps).toEqual(['4 × 45 min at €30.00 = €120.00']);
  });
});

it('S10 start in mid-term, flat fee: 395.36', () => {
  const [planned, remaining] = [autumn(4).length, autumn(4, '2026-10-15').length];
  expect([planned, remaining]).toEqual([14, 9]);
  expect(prorateTerm({ feeMinor: 61_500, planned, remaining }, words)).toEqual({
    value: 39_536, steps: ['9 of 14 lessons left: $615.00 × 9 ÷ 14 = $395.36'],
  });
});

it.each<[MonthRule, number]>([['by_lessons', 12_600], ['by_days', 9755], ['half_month', 16_800]])('S11 start in mid-month, %s', (rule, minor) => {
  const lessonDates = ['2026-10-07', '2026-10-14', '2026-10-21', '2026-10-28'];
  expect(prorateMonth({ feeMinor: 16_800, startsOn: '2026-10-14', lessonDates, rule }, words).value).toBe(minor);
});

it.each([[15_540, 26, 420], [13_440, 22, -1680]])('S12 leaving a monthly fee of %i after %i lessons', (feeMinor, lessonsUsed, minor) => {
  expect(settleMonthlyFlat({ monthsPaid: 7, feeMinor, lessonsUsed, unitMinor: 4200 }, words).value).toBe(minor);
});

it('S13 withdrawal with notice, discounted line: 151.20 goes back', () => {
  const effect = withdrawalCredit({ receivedOn: '2026-10-20', noticeDays: 30, netMinor: 56_700, lessonDates: autumn(2) }, words);
  expect(effect.value).toEqual({ lastChargeableOn: '2026-11-19', lastLessonOn: '2026-11-17', lessonsBack: 4, creditMinor: 15_120 });
  expect(effect.steps.at(-1)).toBe('4 of 15 lessons go back: $567.00 × 4 ÷ 15 = $151.20');
});

const RULES: DiscountRule[] = [
  { id: 'multi', label: 'Second lesson', qualifies: 'multi_lesson', rateBp: 500, orderNo: 2 },
  { id: 'child', label: 'Second child', qualifies: 'second_child', rateBp: 1000, orderNo: 1 },
];
const GROSS = [
  { key: 'ada', studentId: 'ada', grossMinor: 120_000 },
  { key: 'ben', studentId: 'ben', grossMinor: 63_000 },
  { key: 'ben-group', studentId: 'ben', grossMinor: 27_000 },
];
const AWARDS = [{ id: 'award', label: 'Scholarship', studentId: 'ben', lineKey: null, rateBp: 2500 }];

describe('S14 discounts one after the other', () => {
  it('each on what the one before left: 1,798.39', () => {
    const lines = discountLines(GROSS, RULES, AWARDS, { mode: 'one_after_other', words });
    expect(lines.map((line) => line.netMinor)).toEqual([120_000, 42_525, 17_314]);
    expect(lines[2]?.steps.map(({ afterMinor }) => afterMinor)).toEqual([24_300, 23_085, 17_314]);
    expect(lines[2]?.steps.map(({ sentence }) => sentence)).toEqual([
      'Second child, 10 %: $270.00 − $27.00 = $243.00', 'Second lesson, 5 %: $243.00 − $12.15 = $230.85', 'Scholarship, 25 %: $230.85 − $57.71 = $173.14',
    ]);
  });
  it('best automatic discount only: 1,807.50', () => {
    const lines = discountLines(GROSS, RULES, AWARDS, { mode: 'best_only', words });
    expect(lines.map((line) => line.netMinor)).toEqual([120_000, 42_525, 18_225]);
  });
});

describe('S15 instalments', () => {
  const plan = { count: 4, firstDueOn: '2026-09-15', depositBp: 0, movesToWorkingDay: true };
  it('four of 1,798.39; the Sunday moves to Monday', () => {
    expect(instalmentsOf(179_839, plan, words).value).toEqual([
      { instalmentNo: 1, dueOn: '2026-09-15', amountMinor: 44_960 }, { instalmentNo: 2, dueOn: '2026-10-15', amountMinor: 44_960 },
      { instalmentNo: 3, dueOn: '2026-11-16', amountMinor: 44_960 }, { instalmentNo: 4, dueOn: '2026-12-15', amountMinor: 44_959 },
    ]);
  });
  it('with a deposit of 25 %', () => {
    expect(instalmentsOf(179_839, { ...plan, depositBp: 2500 }, words).value.map(({ amountMinor }) => amountMinor)).toEqual([44_960, 44_960, 44_960, 44_959]);
  });
  it('a closed Monday moves on to Tuesday', () => expect(nextWorkingDay('2026-11-15', new Set(['2026-11-16']))).toBe('2026-11-17'));
});

const SPLIT = [
  { kind: 'tuition', method: 'percent', parts: [{ payerId: 'noor', bp: 6000 }, { payerId: 'sam', bp: 4000 }] },
  { kind: '*', method: 'whole', parts: [{ payerId: 'sam' }] },
] as const;
const CHARGES = [
  { kind: 'tuition', amountMinor: 120_000 }, { kind: 'tuition', amountMinor: 42_525 }, { kind: 'tuition', amountMinor: 17_314 },
  { kind: 'book', amountMinor: 2646 }, { kind: 'recital', amountMinor: 2000 },
];

describe('S16 split payers', () => {
  const shares = splitCharges(CHARGES, SPLIT, 'noor', words);
  it('1,079.03 and 765.82', () => {
    expect(shares.map(({ payerId, amountMinor }) => [payerId, amountMinor])).toEqual([['noor', 107_903], ['sam', 76_582]]);
  });
  it('the sentences of one payer do not speak of the other', () => {
    const noor = JSON.stringify(shares[0]?.parts);
    expect(noor).toContain('Tuition: your 60 % of $1,798.39 = $1,079.03');
    expect(noor).not.toMatch(/sam|40 %|719\.36|71936|765\.82/i);
  });
  it('S17 a credit of 151.20 follows the payers: 90.72 and 60.48', () => {
    const tuition = shares.map(({ payerId, parts }) => ({ payerId, amountMinor: parts.find(({ kind }) => kind === 'tuition')?.amountMinor ?? 0 }));
    expect(splitCredit(15_120, tuition).map(({ amountMinor }) => amountMinor)).toEqual([9072, 6048]);
  });
});

const item = (id: string, dueOn: string, openMinor: number, kind: OpenItem['kind'] = 'instalment'): OpenItem => ({ id, kind, label: id, dueOn, numberNo: 1, openMinor });

it('S20 allocation: oldest due first, fees last', () => {
  const items = [item('C', '2026-11-01', 16_800), item('fee', '2026-10-09', 1000, 'late_fee'), item('B', '2026-10-01', 38_800), item('A', '2026-09-01', 12_000)];
  const { value, steps } = allocate(50_000, items, words);
  expect(value.allocations.map(({ itemId, amountMinor }) => [itemId, amountMinor])).toEqual([['A', 12_000], ['B', 38_000]]);
  expect(value.creditMinor).toBe(0);
  expect(steps.at(-1)).toBe('Still open: $186.00');
});

it('S21 ageing as at 31 October', () => {
  const rows = [
    { dueOn: '2026-07-25', openMinor: 12_000 }, { dueOn: '2026-08-20', openMinor: 15_000 }, { dueOn: '2026-09-15', openMinor: 8400 },
    { dueOn: '2026-10-01', openMinor: 18_800 }, { dueOn: '2026-10-31', openMinor: 4200 }, { dueOn: '2026-11-15', openMinor: 44_960 },
  ];
  expect(ageingOf(rows, 3500, '2026-10-31').value).toEqual({
    buckets: { not_due: 49_160, to_30: 18_800, to_60: 8400, to_90: 15_000, over_90: 12_000 }, grossMinor: 103_360, creditMinor: 3500, netMinor: 99_860,
  });
});
