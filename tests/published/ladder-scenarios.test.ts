import { describe, expect, it } from 'vitest';
import { rehearse, sharePermille, standingAfter, unmappedRungs, type OldStanding, type RungMapping } from '@/lib/ladder/edition-change';
import { agreementOf, chanceOfAtLeast, isDrifting, needsMeeting, type TwoMarks } from '@/lib/ladder/moderation';
import { afterReview, dueReviews, firstReview, tellsTeacher, type ReviewCard } from '@/lib/ladder/review';

/** Worked examples of the school's job scenarios; kappa after Cohen (1960), the tail of the binomial by its definition. */
describe('S34, a new edition', () => {
  const rungs = ['1.1', '1.2', '1.3', '1.4', '2.1', '2.2', '2.3', '3.1', '3.2', '3.3', '4.1', '4.2', '4.3', '4.4', '4.5', '5.1', '5.2', '5.3', '6.1', '6.2'];
  // Ada has 4.3 and 4.5 and is at 4.4.
  const passed = new Set(['1.1', '1.2', '1.3', '1.4', '2.1', '2.2', '2.3', '3.1', '3.2', '4.1', '4.3', '4.5']);
  const ada: OldStanding[] = rungs.map((rung) => ({ rung, state: passed.has(rung) ? 'passed' : rung === '4.4' ? 'working' : 'open' }));
  const mappings: RungMapping[] = rungs.flatMap((rung): RungMapping[] => {
    if (rung === '4.3') return [{ from: rung, to: '4.3a', rule: 'credited' }, { from: rung, to: '4.3b', rule: 'credited' }];
    return [{ from: rung, to: rung, rule: rung === '4.5' ? 'kept' : 'same' }];
  });
  const newOrder = mappings.map(({ to }) => to);

  it('12 of 20 is 60 %, then 13 of 21 is 61.9 %', () => {
    const seen = rehearse('ada', ada, newOrder, mappings);
    expect(seen).toMatchObject({ hadBefore: 12, ofBefore: 20, hasAfter: 13, ofAfter: 21, heldUpBy: [] });
    expect([sharePermille(12, 20), sharePermille(13, 21)]).toEqual([600, 619]);
  });
  it('both halves are credited, 4.5 is kept, the one in progress goes on', () => {
    const after = new Map(standingAfter(ada, mappings).map(({ rung, state }) => [rung, state]));
    expect([after.get('4.3a'), after.get('4.3b'), after.get('4.5'), after.get('4.4'), after.get('6.2')]).toEqual(['credited', 'credited', 'passed', 'working', null]);
  });
  it('a rung without mapping blocks publishing; nothing passed becomes unpassed', () => {
    expect(unmappedRungs(rungs, mappings)).toEqual([]);
    expect(unmappedRungs(rungs, mappings.filter(({ from }) => from !== '4.3'))).toEqual(['4.3']);
    for (const rule of ['same', 'credited', 'kept', 're_check'] as const) expect(standingAfter([{ rung: 'a', state: 'passed' }], [{ from: 'a', to: 'a', rule }])[0]?.state).not.toBeNull();
  });
  it('a new rung below the highest one held is named as what holds a student up', () => {
    const withNew: RungMapping[] = [...mappings, { from: null, to: '2.9', rule: 'new' }];
    expect(rehearse('ada', ada, [...newOrder.slice(0, 7), '2.9', ...newOrder.slice(7)], withNew).heldUpBy).toEqual(['2.9']);
  });
});

describe('S35, two markers and drift', () => {
  const times = (count: number, first: TwoMarks['first'], second: TwoMarks['second']): TwoMarks[] => Array.from({ length: count }, () => ({ first, second }));
  const marks = [...times(9, 'passed', 'passed'), ...times(6, 'not_yet', 'not_yet'), ...times(4, 'passed', 'not_yet'), ...times(1, 'not_yet', 'passed')];
  it('15 of 20 agree, half by chance: kappa 0.50, a meeting', () => {
    const agreement = agreementOf(marks);
    expect(agreement?.observed).toBeCloseTo(0.75, 10);
    expect(agreement?.byChance).toBeCloseTo(0.5, 10);
    expect(agreement?.kappa).toBeCloseTo(0.5, 10);
    expect(agreement?.range?.from).toBeCloseTo(0.5 - 1.96 * Math.sqrt(0.75 * 0.25 / 20) / 0.5, 10);
    expect(needsMeeting(agreement)).toBe(true);
  });
  it('no opinion without marks, and when both always pass', () => {
    expect([agreementOf([]), needsMeeting(null)]).toEqual([null, false]);
    expect(agreementOf(times(5, 'passed', 'passed'))).toMatchObject({ observed: 1, kappa: null });
    expect(needsMeeting(agreementOf(times(5, 'passed', 'passed')))).toBe(false);
  });
  it('19 of 20 where the school passes 70 %: a chance of 0.0076, an invitation', () => {
    expect(chanceOfAtLeast(19, 20, 0.7)).toBeCloseTo(0.0076, 4);
    expect(isDrifting(19, 20, 0.7)).toBe(true);
    expect([isDrifting(14, 20, 0.7), isDrifting(5, 20, 0.7), isDrifting(5, 5, 0.2)]).toEqual([false, true, false]);
    expect(chanceOfAtLeast(0, 20, 0.7)).toBeCloseTo(1, 10);
  });
});

describe('S36, spaced review', () => {
  it('the boxes and days of the worked example', () => {
    const log: string[] = [];
    let card: ReviewCard = firstReview('2026-10-01');
    const note = () => log.push(`${card.box}:${card.dueOn}`);
    note();
    for (const [doneOn, isGood] of [['2026-10-02', true], ['2026-10-05', true], ['2026-10-14', true], ['2026-10-28', false], ['2026-10-29', true]] as const) {
      card = afterReview(card, { doneOn, isGood });
      note();
    }
    expect(log).toEqual(['1:2026-10-02', '2:2026-10-05', '3:2026-10-12', '4:2026-10-28', '1:2026-10-29', '2:2026-11-01']);
  });
  it('the last box comes back to itself; two failures in a row tell the teacher', () => {
    const last = { box: 6, dueOn: '2026-10-01', failuresInRow: 0 };
    expect(afterReview(last, { doneOn: '2026-10-01', isGood: true })).toEqual({ box: 6, dueOn: '2026-11-30', failuresInRow: 0 });
    const once = afterReview(last, { doneOn: '2026-10-01', isGood: false });
    expect([tellsTeacher(once), tellsTeacher(afterReview(once, { doneOn: '2026-10-02', isGood: false }))]).toEqual([false, true]);
  });
  it('after a holiday there is a cap, the longest overdue first', () => {
    const cards = ['2026-08-03', '2026-08-01', '2026-08-02', '2026-09-09'].map((dueOn) => ({ dueOn, box: 1 }));
    expect(dueReviews(cards, '2026-09-01', 2).map(({ dueOn }) => dueOn)).toEqual(['2026-08-01', '2026-08-02']);
    expect(dueReviews(cards, '2026-07-01', 5)).toEqual([]);
  });
});
