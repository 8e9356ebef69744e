import { describe, expect, it } from 'vitest';
import { editionProblems, rungProblems, type DraftRung } from './edition-check';
import { FIRST_EDITION } from './first-edition/edition';
import type { Need } from './needs';
import { readTurns, turnsText } from './spec-text';

const rungs: DraftRung[] = FIRST_EDITION.levels.flatMap((level) => level.rungs).map((rung) => ({ ...rung, id: rung.code }));
const needs: Need[] = FIRST_EDITION.levels.flatMap((level) => level.rungs).flatMap(({ code, must }) => must.map((needed): Need => ({ rung: code, needs: needed, kind: 'must' })));
const same = rungs.map(({ id }) => ({ from: id, to: id, rule: 'same' as const }));
const draft = { rungs, needs, mappings: same, oldRungs: rungs };

describe('what a rung asks, written down', () => {
  it.each(rungs.map((rung) => [rung.code, rung] as const))('%s reads back as it was written', (_code, { spec }) => {
    expect(readTurns(turnsText(spec.turns))).toEqual({ kind: 'turns', turns: spec.turns });
  });
  it.each([
    ['', /^Write what is asked/], ['nonsense', /^Line 1: “nonsense” is not/], ['x m7: 1-b3-b7', /“x” is no step/], ['2 foo: 1-3', /“foo” is no kind/], ['1 maj9\n2 m7: 1-b3-99', /^Line 2: “99” is no degree/],
    ['1 maj9: 1-3-7 [90-20]', /not a place/], ['1 maj9: 1-3-7 [somewhere]', /not a place/], ['1 m7\n'.repeat(25), /At most 24/],
  ])('%s is refused in a sentence', (text, message) => {
    const reading = readTurns(text);
    expect(reading.kind === 'refused' ? reading.message : '').toMatch(message);
  });
});

describe('what stands against an edition', () => {
  const texts = (over: Partial<typeof draft>) => editionProblems({ ...draft, ...over }).map(({ text }) => text);
  it('nothing against the first one', () => {
    expect(texts({})).toEqual([]);
  });
  it('a circle, a rung that never opens, a rung that leads nowhere, an empty one', () => {
    expect(texts({ needs: [...needs, { rung: '1.1', needs: '10.4', kind: 'must' }] })[0]).toMatch(/^The needs lead in a circle: /);
    expect(texts({ needs: [...needs, { rung: '1.1', needs: 'gone', kind: 'must' }] }).length).toBe(rungs.length);
    expect(texts({ mappings: same.slice(1) })).toEqual(['1.1 of the live edition leads nowhere. Say which rung it becomes, so that nobody loses a pass.']);
    expect(texts({ rungs: [], needs: [] })).toEqual(['The edition has no rung.']);
  });
  it('missing plain words, too few keys, a place that is too narrow', () => {
    const rung = rungs.find(({ code }) => code === '5.1');
    if (!rung) throw new Error('no 5.1');
    expect(rungProblems({ ...rung, canDo: ' ' })).toEqual(['guardians need plain words: what one can do with it.']);
    expect(rungProblems({ ...rung, keysNeeded: 13 })).toEqual(['13 keys are needed and only 12 drawn.']);
    const narrow = { ...rung, spec: { ...rung.spec, turns: [[{ step: '1' as const, suffix: 'm9', stacks: ['b3-5-b7-9'], register: { lowest: 60, highest: 72 } }]] } };
    expect(rungProblems(narrow).some((text) => text.startsWith('it does not fit its place on the keyboard in'))).toBe(true);
  });
});
