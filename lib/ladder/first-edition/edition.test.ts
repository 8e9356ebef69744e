import { describe, expect, it } from 'vitest';
import { asksOf, askDegrees, askName, drawnLabel, judgeAsk } from '../asks';
import { drawKeys } from '../draw';
import { findCircle, unreachableRungs, type Need } from '../needs';
import { criteriaSchema, playSpecSchema, type RungSeed } from '../play-spec';
import { FIRST_EDITION } from './edition';
import { sortedDistance } from '../../harmony/voice-leading';
import type { VoicedNote } from '../../harmony/degree';

const rungs = FIRST_EDITION.levels.flatMap((level) => level.rungs);
const rung = (code: string): RungSeed => rungs.find((one) => one.code === code) ?? (() => { throw new Error(code); })();
const needs: Need[] = rungs.flatMap(({ code, must, should = [] }) => [
  ...must.map((needed): Need => ({ rung: code, needs: needed, kind: 'must' })), ...should.map((needed): Need => ({ rung: code, needs: needed, kind: 'should' })),
]);

it('has ten levels and 37 rungs, each code once', () => {
  expect(FIRST_EDITION.levels.map(({ no }) => no)).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9, 10]);
  expect(new Set(rungs.map(({ code }) => code)).size).toBe(rungs.length);
  expect(rungs).toHaveLength(37);
});

it('leads in no circle and every rung can be reached from 1.1', () => {
  expect(findCircle(needs)).toBeNull();
  expect(unreachableRungs(rungs.map(({ code }) => code), needs)).toEqual([]);
  expect(rungs.filter(({ must }) => must.length === 0).map(({ code }) => code)).toEqual(['1.1']);
});

it('finds a circle when there is one', () => {
  expect(findCircle([...needs, { rung: '1.1', needs: '10.4', kind: 'must' }])).not.toBeNull();
  expect(unreachableRungs(['a', 'b'], [{ rung: 'b', needs: 'gone', kind: 'must' }])).toEqual(['b']);
});

describe.each(rungs)('rung $code', ({ code, spec, criteria, keyPool, keysDrawn, keysNeeded, title, plainTitle, canDo, soundsLike }) => {
  it('is well formed and says itself in plain words', () => {
    expect(playSpecSchema.parse(spec)).toEqual(spec);
    expect(criteriaSchema.parse(criteria)).toEqual(criteria);
    expect(keysNeeded).toBeLessThanOrEqual(keysDrawn);
    for (const words of [plainTitle, canDo, soundsLike]) expect(words).not.toMatch(/rootless|dominant|altered|drop 2|♭|♯|\d|guide tone|shell/i);
    expect(canDo).toMatch(/^[a-z]/);
    expect(title.length).toBeLessThan(50);
  });

  it('can be asked in every key and every turn, inside its register, and its own notes are judged right', () => {
    for (const key of keyPool) {
      spec.turns.forEach((_chords, turn) => {
        for (const ask of asksOf(spec, { key, turn })) {
          const keys = ask.shown.notes.map((note) => note.key);
          if (spec.how === 'voicing') expect(judgeAsk(ask, keys)).toMatchObject({ isRight: true });
          else expect(keys).toEqual([]);
          expect(ask.answer === null).toBe(spec.how === 'voicing');
          expect(ask.symbol).not.toMatch(/^[A-G](bb|##)/);
        }
        expect(drawnLabel(spec, { key, turn }, 'words')).toMatch(/^[A-G]/);
      });
    }
    expect(code).toBeTruthy();
  });

  it('draws enough keys, and all of the pool when there is room', () => {
    const drawn = drawKeys({ keyPool, turnCount: spec.turns.length, count: keysDrawn, isShuffled: criteria.isShuffled, seed: 7, records: [] });
    expect(drawn).toHaveLength(keysDrawn);
    if (keysDrawn >= keyPool.length) expect(new Set(drawn.map(({ key }) => key)).size).toBe(keyPool.length);
  });
});

const moved = (from: readonly VoicedNote[], to: readonly VoicedNote[]): number => sortedDistance(from.map(({ key }) => key), to.map(({ key }) => key));
const shown = (code: string, key: string, turn = 0) => asksOf(rung(code).spec, { key, turn }).map((ask) => ask.shown.notes.map((note) => note.key));

it('asks the three stacks of C where the published table has them', () => {
  expect([shown('1.4', 'C', 0)[0], shown('1.4', 'C', 1)[0], shown('1.4', 'C', 2)[0]]).toEqual([[48, 52, 59, 62, 67], [50, 55, 60, 65, 69], [43, 53, 59, 64, 69]]);
});

it('1.5: the top line falls A4 A♭4 G4 and the upper voices move 9 in all', () => {
  const chords = asksOf(rung('1.5').spec, { key: 'C', turn: 0 }).map((ask) => ask.shown.notes);
  expect(chords.map((notes) => notes.at(-1)?.note)).toEqual(['A4', 'Ab4', 'G4']);
  expect(moved(chords[0]?.slice(1) ?? [], chords[1]?.slice(1) ?? []) + moved(chords[1]?.slice(1) ?? [], chords[2]?.slice(1) ?? [])).toBe(9);
});

const total = (code: string, key: string, turn: number) => {
  const chords = asksOf(rung(code).spec, { key, turn }).map((ask) => ask.shown.notes);
  return chords.slice(1).reduce((sum, notes, at) => sum + moved(chords[at] ?? [], notes), 0);
};

describe('shown paths move as little as the published optimum', () => {
  const keys = rung('6.3').keyPool;
  it.each(keys)('guide tones in %s: 2 per cadence', (key) => {
    expect([total('3.2', key, 0), total('3.2', key, 1)]).toEqual([2, 2]);
  });
  it.each(keys)('cycle of dominants from %s: 1 + 1 down each time', (key) => {
    expect([total('3.3', key, 0), total('3.3', key, 1)]).toEqual([6, 6]);
  });
  it.each(keys)('rootless two-five-one in %s: 6', (key) => {
    expect([total('6.3', key, 0), total('6.3', key, 1)]).toEqual([6, 6]);
  });
  it.each(keys)('minor cadence in %s: at least one form at the optimum 8', (key) => {
    expect(Math.min(total('8.3', key, 0), total('8.3', key, 1))).toBe(8);
  });
  it.each(keys)('drop 2 in %s: 6', (key) => {
    expect(total('9.4', key, 0)).toBe(6);
  });
  it.each(keys)('a dominant and its substitute in %s share their guide tones: 0', (key) => {
    expect([total('10.1', key, 0), total('10.1', key, 1)]).toEqual([0, 0]);
  });
  it('turnaround 22, F blues 40', () => {
    expect(total('10.3', 'C', 0)).toBe(22);
    expect(total('10.4', 'F', 0)).toBe(40);
  });
});

it('asks for chords as players write them', () => {
  expect(asksOf(rung('10.2').spec, { key: 'Gb', turn: 0 }).map(({ symbol }) => symbol)).toEqual(['Abm9', 'G13', 'Gbmaj9']);
  expect(asksOf(rung('8.3').spec, { key: 'Db', turn: 0 }).map(({ symbol }) => symbol)).toEqual(['D#m7b5', 'G#7b9b13', 'C#m6/9']);
  const minor = rung('4.2');
  expect(minor.keyPool.map((key) => drawnLabel(minor.spec, { key, turn: 0 }, 'words'))).toEqual(['Cm', 'Fm', 'B♭m', 'E♭m', 'A♭m', 'C♯m', 'F♯m', 'Bm', 'Em', 'Am', 'Dm', 'Gm']);
  const [ask] = asksOf(minor.spec, { key: 'D', turn: 0 });
  expect(ask && [askName(ask, 'words'), askDegrees(ask)]).toEqual(['Dm11', '1 11 ♭7 ♭3 5']);
});

it('knows the answers of what is told, not played', () => {
  expect(asksOf(rung('1.1').spec, { key: 'C', turn: 6 })[0]?.answer).toBe('B  D  F  A');
  const answers = [0, 1, 2].map((turn) => asksOf(rung('1.3').spec, { key: 'C', turn })[0]?.answer);
  expect(answers).toEqual(['9 and 13 may be added; 11 is left out.', '9 and 11 may be added, 13 with care.', '9 and 13 may be added; 11 is left out.']);
});

it('says for a free voicing what may sound', () => {
  expect(asksOf(rung('4.4').spec, { key: 'C', turn: 0 })[0]?.answer).toBe('9 and 13 may be added; 11 is left out.');
  expect(asksOf(rung('7.4').spec, { key: 'G', turn: 1 })[0]?.answer).toBe('♭9 and 13 must sound; 9 and 11 are left out.');
  expect(asksOf(rung('7.4').spec, { key: 'G', turn: 3 })[0]?.answer).toBe('♭9, ♯9, ♯11, ♭13 may be added, at least one of them.');
});

it('takes either form where the rung leaves the choice', () => {
  const asks = rung('9.4').keyPool.flatMap((key) => asksOf(rung('9.4').spec, { key, turn: 0 }));
  for (const ask of asks) {
    expect(ask.accepts.length).toBeGreaterThan(3);
    for (const { notes } of ask.accepts) expect(judgeAsk(ask, notes.map(({ key }) => key)).kind).toBe('exact');
  }
  const forms = rung('5.3').keyPool.map((key) => asksOf(rung('5.3').spec, { key, turn: 0 })[0]?.shown.notes[0]?.degree);
  expect(new Set(forms)).toEqual(new Set(['b3', 'b7']));
});
