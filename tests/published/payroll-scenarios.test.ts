import { describe, expect, it } from 'vitest';
import type { Attendance } from '@/lib/calendar/attendance';
import { sumOf } from '@/lib/money';
import { CONSEQUENCES } from '@/lib/calendar/consequences';
import { payLineOfMileage, payLineOfTime, payLinesOfLesson, type LessonFacts, type Worker } from '@/lib/payroll/pay-lines';
import { payShareBp, type PayRule } from '@/lib/payroll/pay-rules';
import { payTotalsOf, summaryOf } from '@/lib/payroll/pay-totals';
import { findRate, type PayRate } from '@/lib/payroll/rates';

/** Source: the acceptance scenarios of the job map, Part 3, and its house rules HR7 and HR8. */
const words = { currency: 'USD', locale: 'en-US' };
const MARA: Worker = { engagementId: 'mara', personId: 'mara', name: 'Mara', kind: 'employee' };
const LEO: Worker = { engagementId: 'leo', personId: 'leo', name: 'Leo', kind: 'contractor' };

let ids = 0;
const rate = (engagementId: string, over: Partial<PayRate>): PayRate => ({
  id: `rate-${ids++}`, engagementId, workType: 'lesson', lessonTypeId: null, lengthMinutes: null, seatsFrom: null, seatsTo: null, siteId: null,
  amountMinor: 0, per: 'lesson', validFrom: '2026-01-01', validTo: null, ...over,
});
const RATES: PayRate[] = [
  ...([[30, 2100], [45, 3000], [60, 3800]] as const).map(([lengthMinutes, amountMinor]) => rate('mara', { lengthMinutes, amountMinor })),
  ...([[30, 1900], [45, 2700], [60, 3400]] as const).map(([lengthMinutes, amountMinor]) => rate('leo', { lengthMinutes, amountMinor })),
  ...([[1, 3, 4000], [4, 6, 4600], [7, null, 5200]] as const).map(([seatsFrom, seatsTo, amountMinor]) => rate('mara', { workType: 'group', seatsFrom, seatsTo, amountMinor })),
  rate('mara', { workType: 'recital', amountMinor: 2000, per: 'hour' }),
  rate('mara', { workType: 'admin', amountMinor: 1800, per: 'hour' }),
  rate('mara', { workType: 'travel', amountMinor: 1800, per: 'hour' }),
];
const RULES: PayRule[] = [{ kind: 'substitute', engagementKind: null, value: { ofAbsentRateBp: 9000 }, validFrom: '2026-01-01', validTo: null }];
const facts = { rates: RATES, rules: RULES, consequences: [], words };

const lesson = (lengthMinutes: number, attendance: Attendance, over: Partial<LessonFacts> = {}): LessonFacts => ({
  occurrenceId: `lesson-${ids++}`, localDate: '2026-10-06', startMin: 960, lengthMinutes, lessonTypeId: 'single', workType: 'lesson', label: 'Single lesson', siteId: 'quay',
  planned: MARA, taughtBy: MARA, seats: [{ studentName: 'Ada', attendance, countsForSize: true }], ...over,
});
const group = (seats: number, came: number, over: Partial<LessonFacts> = {}): LessonFacts => lesson(60, 'present', {
  workType: 'group', lessonTypeId: 'group', label: 'Wednesday group',
  seats: Array.from({ length: seats }, (_, index) => ({ studentName: `Student ${index}`, attendance: index < came ? 'present' : 'no_show', countsForSize: true })), ...over,
});
const times = (count: number, make: () => LessonFacts) => Array.from({ length: count }, make);
const pay = (lessons: LessonFacts[]) => lessons.flatMap((one) => payLinesOfLesson(one, facts));
const time = (workType: 'recital' | 'admin' | 'travel', minutes: number) =>
  payLineOfTime({ timeEntryId: `time-${ids++}`, engagementId: 'mara', workType, localDate: '2026-10-09', minutes, siteId: null, note: '' }, facts);

it('S26 fortnight gross: 562.50', () => {
  const lessons = pay([
    ...times(10, () => lesson(30, 'present')), lesson(30, 'no_show'), lesson(30, 'late_notice'), ...times(2, () => lesson(30, 'away_with_notice')),
    ...times(4, () => lesson(45, 'present')), ...times(3, () => lesson(60, 'present')),
  ]);
  const lines = [...lessons, time('recital', 180), time('admin', 90)];
  const totals = payTotalsOf(lines);
  expect(totals).toMatchObject({ grossMinor: 56_250, teachingMinor: 47_550, otherMinor: 8700, lessons: 19, problems: 0 });
  expect(lines.find(({ shareBp }) => shareBp === 5000)?.explain).toEqual(['30 min single lesson at $21.00 × 50 % (away, told late) = $10.50']);
  expect(lines.at(-2)?.explain).toEqual(['Recital, 3 h at $20.00 an hour = $60.00']);
  const summed = lessons.map((line) => ({ ...line, lengthMinutes: line.shareBp === 5000 ? 30 : line.minutes }));
  expect(summaryOf(summed, words).map(({ sentence }) => sentence)).toContain('4 × 45 min at $30.00 = $120.00');
});

it('S26 each line is rounded once: three 50-minute lessons at 37.00 an hour are 92.49', () => {
  const hourly = { ...facts, rates: [rate('mara', { amountMinor: 3700, per: 'hour' })] };
  const lines = times(3, () => lesson(50, 'present')).flatMap((one) => payLinesOfLesson(one, hourly));
  expect(sumOf(lines.map(({ amountMinor }) => amountMinor))).toBe(9249);
});

describe('S27 size tiers and substitute', () => {
  const week = [group(3, 3), group(4, 4), group(6, 4, { taughtBy: LEO }), group(7, 7)];
  const lines = pay([...week, lesson(30, 'present', { taughtBy: LEO }), lesson(60, 'present', { taughtBy: LEO })]);
  const of = (engagementId: string) => lines.filter((line) => line.engagementId === engagementId);

  it('without the cover: 184.00, by enrolled seats and not by who came', () => {
    expect(pay([group(3, 3), group(4, 4), group(6, 4), group(7, 7)]).map(({ amountMinor }) => amountMinor)).toEqual([4000, 4600, 4600, 5200]);
  });
  it('Mara 138.00', () => expect(payTotalsOf(of('mara')).grossMinor).toBe(13_800));
  it('Leo 99.20', () => {
    expect(of('leo').map(({ amountMinor }) => amountMinor)).toEqual([4600, 1900, 3420]);
    expect(payTotalsOf(of('leo')).grossMinor).toBe(9920);
    expect(of('leo')[2]?.explain).toEqual(['Cover, the larger of your own rate, $34.00, and 90 % of the absent teacher’s, $34.20 = $34.20']);
  });
});

it('S08 a snow day pays employees half and contractors nothing', () => {
  expect(pay(times(3, () => lesson(30, 'school_closed'))).map(({ amountMinor }) => amountMinor)).toEqual([1050, 1050, 1050]);
  expect(pay([lesson(45, 'school_closed', { planned: LEO, taughtBy: LEO })])[0]?.amountMinor).toBe(0);
});

it('S30 travel 7.50 and mileage 7.98, the mileage not in wages', () => {
  const mileage = payLineOfMileage({ mileageEntryId: 'm', engagementId: 'mara', localDate: '2026-10-09', milesTenths: 114, rateMinorPerMile: 70, route: 'Quay to Mill' }, words);
  expect(mileage.explain).toEqual(['11.4 miles at $0.70 = $7.98']);
  expect(payTotalsOf([time('travel', 25), mileage])).toMatchObject({ grossMinor: 750, reimbursementMinor: 798 });
});

describe('what cannot be paid is said, never guessed', () => {
  it('not marked', () => expect(pay([lesson(30, 'expected')])[0]).toMatchObject({ amountMinor: 0, problem: 'Not marked yet: Ada.' }));
  it('no rate', () => expect(pay([lesson(50, 'present')])[0]?.problem).toBe('There is no rate for lesson of 50 minutes.'));
  it('two rates of equal weight', () => {
    const rows = [rate('mara', { siteId: 'quay', amountMinor: 1 }), rate('mara', { lengthMinutes: 30, amountMinor: 2 })];
    expect(findRate(rows, { engagementId: 'mara', workType: 'lesson', lessonTypeId: 'single', lengthMinutes: 30, seats: null, siteId: 'quay', on: '2026-10-06' }).problem)
      .toBe('2 rates fit lesson of 30 minutes equally well. End one of them.');
  });
  it('the most specific row wins, on its dates only', () => {
    const rows = [rate('mara', { amountMinor: 1 }), rate('mara', { lengthMinutes: 30, amountMinor: 2, validTo: '2026-10-06' }), rate('mara', { lengthMinutes: 30, siteId: 'quay', amountMinor: 3 })];
    const ask = (on: string, siteId: string) => findRate(rows, { engagementId: 'mara', workType: 'lesson', lessonTypeId: null, lengthMinutes: 30, seats: null, siteId, on }).rate?.amountMinor;
    expect([ask('2026-10-05', 'quay'), ask('2026-10-05', 'mill'), ask('2026-10-06', 'mill')]).toEqual([3, 2, 1]);
  });
  it('a trial without its own rate is a lesson of that length', () => {
    expect(pay([lesson(30, 'present', { workType: 'trial', label: 'Trial lesson' })])[0]?.amountMinor).toBe(2100);
  });
});

it('a dated table of the school judges lessons of its own days only', () => {
  const table = { ...CONSEQUENCES, late_notice: { ...CONSEQUENCES.late_notice, payBp: { employee: 7500, contractor: 5000 } } };
  const dated = [{ validFrom: '2026-10-06', validTo: '2026-11-01', table }];
  const share = (on: string, kind: 'employee' | 'contractor' = 'employee') => payShareBp('late_notice', kind, on, dated);
  expect([share('2026-10-05'), share('2026-10-06'), share('2026-10-31'), share('2026-11-01'), share('2026-10-06', 'contractor')]).toEqual([5000, 7500, 7500, 5000, 5000]);
});
