import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { emptyVerdict } from '../harmony/verdict';
import { drawKeys, keyWeight, randomFrom } from './draw';
import { earliestRehearing, isHeardRight, isKeyHeard, mayMove, passProblem, startProblems, type HeardChord } from './hearing';
import { missingNeeds, type Need } from './needs';
import { progressWords } from './progress-words';
import { projectedDate } from './projection';
import { nextRungs, rungStates, type RungFact } from './rung-state';

const NEEDS: Need[] = [{ rung: 'b', needs: 'a', kind: 'must' }, { rung: 'c', needs: 'a', kind: 'must' }, { rung: 'd', needs: 'b', kind: 'must' }, { rung: 'd', needs: 'c', kind: 'must' }, { rung: 'c', needs: 'b', kind: 'should' }];
const RUNGS = ['a', 'b', 'c', 'd'];
const heard = (rung: string, outcome: 'passed' | 'not_yet', at: number): RungFact => ({ kind: 'hearing', rung, outcome, at, on: `2026-10-${String(at).padStart(2, '0')}`, hearingId: `h${at}` });
const statesOf = (facts: RungFact[]) => Object.fromEntries(rungStates(RUNGS, NEEDS, facts).map(({ rung, state }) => [rung, state]));

describe('state of a rung', () => {
  it('opens what needs nothing and locks the rest', () => {
    expect(statesOf([])).toEqual({ a: 'open', b: 'locked', c: 'locked', d: 'locked' });
  });
  it('opens both followers, not the one that needs them', () => {
    expect(statesOf([heard('a', 'passed', 1)])).toEqual({ a: 'passed', b: 'open', c: 'open', d: 'locked' });
  });
  it('a should-need locks nothing', () => {
    expect(missingNeeds('c', NEEDS, new Set(['a']))).toEqual([]);
  });
  it('not yet means being worked on, and a later pass passes', () => {
    expect(statesOf([heard('a', 'not_yet', 1)]).a).toBe('working');
    expect(statesOf([heard('a', 'not_yet', 1), heard('a', 'passed', 9)]).a).toBe('passed');
  });
  it('a pass is never silently taken away', () => {
    expect(statesOf([heard('a', 'passed', 1), { kind: 'recheck', rung: 'a', at: 5, on: '2026-10-05' }])).toMatchObject({ a: 'recheck_due', b: 'open' });
    expect(statesOf([heard('a', 'passed', 1), heard('a', 'not_yet', 9)]).a).toBe('recheck_due');
    expect(statesOf([heard('a', 'passed', 1), { kind: 'recheck', rung: 'a', at: 5, on: '2026-10-05' }, heard('a', 'passed', 9)]).a).toBe('passed');
  });
  it('credit opens what follows; a doubt without a pass changes nothing', () => {
    expect(statesOf([{ kind: 'credit', rung: 'a', at: 1, on: '2026-10-01' }])).toMatchObject({ a: 'credited', b: 'open' });
    expect(statesOf([{ kind: 'recheck', rung: 'a', at: 1, on: '2026-10-01' }]).a).toBe('open');
  });
  it('the order in which facts arrive does not matter', () => {
    const facts = [heard('a', 'not_yet', 1), heard('a', 'passed', 2), heard('b', 'passed', 3), heard('c', 'not_yet', 4)];
    fc.assert(fc.property(fc.shuffledSubarray(facts, { minLength: facts.length }), (order) => { expect(statesOf(order)).toEqual(statesOf(facts)); }));
  });
  it('next rungs: being worked on first, then open', () => {
    const states = rungStates(RUNGS, NEEDS, [heard('a', 'passed', 1), heard('c', 'not_yet', 2)]);
    expect(nextRungs(states, 2).map(({ rung }) => rung)).toEqual(['c', 'b']);
  });
});

describe('draw', () => {
  const base = { keyPool: ['C', 'F', 'Bb', 'Eb'], turnCount: 2, isShuffled: false, records: [] };
  it('the same seed draws the same keys, another seed others', () => {
    const draw = (seed: number) => drawKeys({ ...base, keyPool: 'ABCDEFG'.split(''), count: 4, seed });
    expect(draw(1)).toEqual(draw(1));
    expect(new Set([1, 2, 3, 4, 5].map((seed) => JSON.stringify(draw(seed)))).size).toBeGreaterThan(1);
  });
  it('mulberry32 of seed 1 begins as its author has it', () => {
    const random = randomFrom(1);
    expect([random(), random()].map((value) => value.toFixed(6))).toEqual(['0.627074', '0.002736']);
  });
  it('covers the pool before it repeats, goes along the cycle, and gives no key the same turn twice', () => {
    fc.assert(fc.property(fc.integer({ min: 0, max: 2 ** 32 - 1 }), (seed) => {
      const drawn = drawKeys({ ...base, count: 8, seed });
      expect(drawn.slice(0, 4).map(({ key }) => key)).toEqual(base.keyPool);
      expect(new Set(drawn.map(({ key, turn }) => `${key}${turn}`)).size).toBe(8);
    }));
  });
  it('weak keys come clearly more often', () => {
    const records = [{ key: 'Eb', asked: 4, wrong: 4 }, ...['C', 'F', 'Bb'].map((key) => ({ key, asked: 4, wrong: 0 }))];
    const hits = Array.from({ length: 400 }, (_none, seed) => drawKeys({ ...base, count: 1, seed, records })[0]?.key).filter((key) => key === 'Eb').length;
    expect(hits).toBeGreaterThan(180);
    expect(hits).toBeLessThan(300);
    expect([keyWeight(undefined), keyWeight(records[0]), keyWeight(records[1])]).toEqual([2, 4, 1]);
  });
});

describe('hearing', () => {
  const chord = (over: Partial<HeardChord> = {}): HeardChord => ({ symbol: 'Dm11', played: [50], milliseconds: 1400, verdict: { ...emptyVerdict('exact', ''), isRight: true }, byEar: null, ...over });
  const criteria = { seconds: 5, slipsPerTurn: 0, isShuffled: false, listenFor: '' };
  it('counts right notes in time only', () => {
    expect(isHeardRight(chord(), criteria)).toBe(true);
    expect(isHeardRight(chord({ milliseconds: 5000 }), criteria)).toBe(true);
    expect(isHeardRight(chord({ milliseconds: 5001 }), criteria)).toBe(false);
    expect(isHeardRight(chord({ verdict: emptyVerdict('missing', '') }), criteria)).toBe(false);
    expect(isHeardRight(chord({ verdict: null, byEar: 'right' }), criteria)).toBe(true);
  });
  it('a sequence counts when complete and within its slips', () => {
    const wrong = chord({ verdict: emptyVerdict('foreign', '') });
    expect(isKeyHeard([chord(), chord(), wrong], 3, criteria)).toBe(false);
    expect(isKeyHeard([chord(), chord(), wrong], 3, { ...criteria, slipsPerTurn: 1 })).toBe(true);
    expect(isKeyHeard([chord(), chord()], 3, { ...criteria, slipsPerTurn: 1 })).toBe(false);
  });
  it('a pass needs enough keys or a reason in words', () => {
    expect(passProblem({ heard: 10, byEar: 0, needed: 10 }, '')).toBeNull();
    expect(passProblem({ heard: 12, byEar: 2, needed: 10 }, '')).toBeNull();
    expect(passProblem({ heard: 8, byEar: 0, needed: 10 }, '  ')).toContain('8 of the 10 keys needed are heard');
    expect(passProblem({ heard: 10, byEar: 1, needed: 10 }, '')).toContain('1 key was heard by ear');
    expect(passProblem({ heard: 8, byEar: 0, needed: 10 }, 'The other two were played last week.')).toBeNull();
  });
  it('decided is for good', () => {
    expect(mayMove('decided', 'played')).toBe(false);
    expect(mayMove('planned', 'decided')).toBe(false);
    expect(mayMove('played', 'decided')).toBe(true);
  });
});

describe('job scenario S33', () => {
  it('not yet on Tuesday 6 October, seven days: from 13 October', () => {
    expect(earliestRehearing('2026-10-06', 7)).toBe('2026-10-13');
    const facts = { missing: [], lastNotYetOn: '2026-10-06', attemptsThisTerm: 1, waitDays: 7, attemptsPerTerm: 2 };
    expect(startProblems({ ...facts, today: '2026-10-12' })).toMatchObject([{ kind: 'waiting', until: '2026-10-13' }]);
    expect(startProblems({ ...facts, today: '2026-10-13' })).toEqual([]);
  });
  it('a missing need and a third attempt in a term stand against it', () => {
    const facts = { missing: [], lastNotYetOn: null, attemptsThisTerm: 2, today: '2026-11-01', waitDays: 7, attemptsPerTerm: 2 };
    expect(startProblems(facts).map(({ kind }) => kind)).toEqual(['attempts']);
    expect(startProblems({ ...facts, missing: ['Minor two-five-one'], attemptsThisTerm: 0 }).map(({ kind }) => kind)).toEqual(['needs']);
  });
});

describe('job scenario S36, projection', () => {
  const terms = [{ startsOn: '2026-09-08', endsOn: '2026-12-19' }, { startsOn: '2027-01-11', endsOn: '2027-03-27' }];
  // Gaps 14, 21, 14, 28, 21 before 20 October.
  const passes = ['2026-07-14', '2026-07-28', '2026-08-18', '2026-09-01', '2026-09-29', '2026-10-20'];
  it('3 February 2027, between 15 December and 3 March', () => {
    expect(projectedDate(passes, 4, terms)).toMatchObject({ likelyOn: '2027-02-03', soonestOn: '2026-12-15', latestOn: '2027-03-03' });
  });
  it('shows no date with fewer than three gaps, none beyond the known terms', () => {
    expect(projectedDate(passes.slice(-3), 4, terms)).toBeNull();
    expect(projectedDate(passes.slice(-4), 4, terms)).not.toBeNull();
    expect(projectedDate(passes, 40, terms)).toBeNull();
    expect(projectedDate(passes, 0, terms)).toBeNull();
    expect(projectedDate([], 1, terms)).toBeNull();
  });
});

describe('plain words', () => {
  const rung = { plainTitle: 'The full major ninth chord', canDo: 'play a full major ninth chord in all twelve keys', soundsLike: 'Open and sunny.' };
  const facts = { name: 'Zoë', isReader: false, passed: [{ ...rung, on: '2026-10-20' }], rungCount: 37, next: { ...rung, plainTitle: 'The thirteenth chord', canDo: 'play it' }, projection: null, today: '2026-11-17', locale: 'en-IE' };
  it('says what can be played, what it sounds like and what comes next, and no date without a pace', () => {
    expect(progressWords(facts)).toEqual({
      now: 'Zoë can now play a full major ninth chord in all twelve keys.', sound: 'What it sounds like: open and sunny.',
      next: 'Next: the thirteenth chord. Then Zoë can play it.', when: null, count: '1 of 37 rungs passed.',
    });
  });
  it('speaks to the student', () => {
    expect(progressWords({ ...facts, isReader: true }).now).toBe('You can now play a full major ninth chord in all twelve keys.');
  });
  it('has words for the beginning and the end', () => {
    expect(progressWords({ ...facts, passed: [] }).now).toContain('has begun');
    expect(progressWords({ ...facts, next: null }).next).toBe('Zoë has climbed the whole ladder.');
  });
  it('says a date with its range, never one that is past', () => {
    const projection = { likelyOn: '2026-12-01', soonestOn: '2026-11-24', latestOn: '2026-12-15', steps: [] };
    expect(progressWords({ ...facts, projection }).when).toBe('At this pace it should follow around 1 Dec, somewhere between 24 Nov and 15 Dec.');
    expect(progressWords({ ...facts, projection, today: '2026-12-20' }).when).toBeNull();
  });
});
