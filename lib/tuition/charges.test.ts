import { describe, expect, it } from 'vitest';
import { chargeFor, chargeText, plannedDatesOf, type EnrolmentFacts } from './charges';
import { priceOf } from './prices';
import { differenceOf, type ComparedLine } from './run-difference';
import { shareStateOf } from './share-state';

const words = { currency: 'EUR', locale: 'en-IE' };
const how = { monthRule: 'by_lessons', words } as const;
const enrolment = (over: Partial<EnrolmentFacts>): EnrolmentFacts => ({
  enrolmentId: 'e', studentId: 's', studentName: 'Ada', subjectLabel: 'Voicings', lessonLabel: 'Single lesson', lengthMinutes: 30, model: 'per_term_count',
  startsOn: '2026-09-01', unitMinor: 4200, lessonDates: ['2026-10-06', '2026-10-13'], plannedDates: ['2026-10-06', '2026-10-13', '2026-10-20', '2026-10-27'], ...over,
});

describe('what a period charges', () => {
  it.each([
    ['per_term_count', 8400], ['group_seat', 8400], ['per_lesson', 8400], ['per_term_flat', 2100], ['monthly_flat', 4200],
  ] as const)('%s', (model, minor) => expect(chargeFor(enrolment({ model }), how)?.value.grossMinor).toBe(minor));
  it('nothing for a package, or without lessons', () => {
    expect(chargeFor(enrolment({ model: 'package' }), how)).toBeNull();
    expect(chargeFor(enrolment({ lessonDates: [] }), how)).toBeNull();
  });
  it('a part of the first month', () => {
    expect(chargeFor(enrolment({ model: 'monthly_flat', unitMinor: 16_800, startsOn: '2026-10-13' }), how)?.value.grossMinor).toBe(12_600);
  });
  it('names the lessons', () => {
    const facts = enrolment({});
    expect(chargeText(facts, { quantity: 2, unitMinor: 4200, grossMinor: 8400 })).toBe('Ada: Voicings, 30 min single lesson, 2 lessons');
  });
  it('plans over the whole period, without closed days', () => {
    const period = { startsOn: '2026-10-01', endsOn: '2026-10-31' };
    expect(plannedDatesOf(['2026-10-20'], period, new Set(['2026-10-27']))).toEqual(['2026-10-06', '2026-10-13', '2026-10-20']);
  });
});

describe('the price of the day', () => {
  const row = (over: object) => ({ productId: 'p', siteId: null, lengthMinutes: null, amountMinor: 1, validFrom: '2026-01-01', validTo: null, ...over });
  const rows = [row({ amountMinor: 1 }), row({ siteId: 'mill', amountMinor: 2 }), row({ lengthMinutes: 30, amountMinor: 3 }), row({ siteId: 'mill', lengthMinutes: 30, amountMinor: 4, validTo: '2026-09-01' })];
  const ask = (over: object) => priceOf(rows, { productId: 'p', siteId: 'mill', lengthMinutes: 30, on: '2026-08-31', ...over });
  it.each([
    ['the most specific row', {}, 4], ['its last day has passed', { on: '2026-09-01' }, 3], ['another site', { siteId: 'quay' }, 3],
    ['another length', { lengthMinutes: 45 }, 2], ['neither', { siteId: 'quay', lengthMinutes: 45 }, 1], ['no price yet', { on: '2025-12-31' }, null], ['another product', { productId: 'q' }, null],
  ])('%s', (_name, over, minor) => expect(ask(over)).toBe(minor));
});

describe('beside the last run', () => {
  const line = (over: Partial<ComparedLine>): ComparedLine => ({ enrolmentId: 'e', text: 'Ada: Voicings, 13 lessons', quantity: 13, unitMinor: 4200, netMinor: 54_600, discounts: [], ...over });
  it.each([
    ['new', null, [line({})], 'First bill of this family'],
    ['same', [line({})], [line({})], 'As last time'],
    ['changed', [line({})], [line({ quantity: 15, netMinor: 63_000 })], '15 lessons instead of 13'],
    ['changed', [line({})], [line({ unitMinor: 4400, netMinor: 57_200, discounts: ['Second child'] })], 'Price €42.00 → €44.00 and Second child added'],
    ['changed', [line({})], [line({ enrolmentId: 'f', text: 'Ben: Voicings, 13 lessons' })], 'New: Ben: Voicings; ended: Ada: Voicings'],
    ['changed', [line({}), line({ enrolmentId: 'f', text: 'Ben: Voicings, 13 lessons' })], [line({ quantity: 15 }), line({ enrolmentId: 'f', text: 'Ben: Voicings, 15 lessons', quantity: 15 })], 'Ada: 15 lessons instead of 13; Ben: 15 lessons instead of 13'],
    ['gone', [line({})], [], 'Nothing to charge any more; last time €546.00'],
  ] as const)('%s', (kind, before, after, sentence) => expect(differenceOf(before, after, words)).toEqual({ kind, sentence }));
});

describe('the state of a share', () => {
  const share = (over: object) => shareStateOf({ amountMinor: 100, paidMinor: 0, creditedMinor: 0, nextDueOn: '2026-10-01', ...over }, '2026-10-01');
  it.each([
    [{}, 'open'], [{ nextDueOn: '2026-09-30' }, 'overdue'], [{ paidMinor: 40 }, 'part_paid'], [{ paidMinor: 100, nextDueOn: null }, 'paid'],
    [{ creditedMinor: 100, nextDueOn: null }, 'credited'], [{ amountMinor: 0, nextDueOn: null }, 'nothing_to_pay'],
  ])('%j is %s', (over, state) => expect(share(over)).toBe(state));
});
