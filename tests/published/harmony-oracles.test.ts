import fc from 'fast-check';
import { createRequire } from 'node:module';
import { describe, expect, it } from 'vitest';
import { chordOf } from '@/lib/harmony/chord';
import { chordName } from '@/lib/harmony/chord-name';
import { DEGREES, noteOfDegree, semitonesOf, stackOn, type Degree } from '@/lib/harmony/degree';
import { judge } from '@/lib/harmony/judge';
import { frequencyOf, keyOf, pitchClassOf } from '@/lib/harmony/note';
import { voicingOptions } from '@/lib/harmony/path-finder';
import { readingsOf } from '@/lib/harmony/readings';
import { leadingBetween, sortedDistance } from '@/lib/harmony/voice-leading';

/**
 * Two independent libraries as oracles, for tests only. `chord-symbol` reads symbols: compared are its degrees as a
 * set, without the symbols it is known to read otherwise (a plain 11 without third, 7b9b13 without its fifth).
 * `teoria` knows notes: keys, frequencies, spelled intervals; no triple accidentals, no chord membership.
 */
const require = createRequire(import.meta.url);
type ParsedChord = { normalized?: { intervals: string[] }; error?: unknown[] };
const { chordParserFactory } = require('chord-symbol/lib/chord-symbol.js') as { chordParserFactory: () => (symbol: string) => ParsedChord };
type TeoriaNote = { midi: () => number; fq: () => number; interval: (name: string) => TeoriaNote; toString: () => string };
const { note: teoriaNote } = require('teoria') as { note: (name: string) => TeoriaNote };

const ROOTS = ['C', 'F', 'G'].flatMap((letter) => [letter, `${letter}b`, `${letter}#`]).concat(['D', 'A', 'E', 'B'].flatMap((letter) => [letter, `${letter}b`, `${letter}#`]));
const SUFFIXES = [
  '', 'm', 'dim', 'aug', '5', '7', 'maj7', 'm7', 'm7b5', 'dim7', 'm(maj7)', '7#5', '6', 'm6', '6/9', '9', 'maj9', 'm9', 'm11', '13', 'maj13', 'sus2', 'sus4', '7sus4', '9sus4',
  '7b9', '7#9', '7#11', '7b5', 'maj7#11', 'maj9#11', 'maj7#5', 'add9', '13b9', '13#11',
];
const parse = chordParserFactory();

describe('degrees against an independent parser of symbols', () => {
  it.each(SUFFIXES)('C%s in 21 roots', (suffix) => {
    for (const root of ROOTS) {
      // It counts the second of a suspended chord as a 9: the same letter.
      const theirs = parse(root + suffix).normalized?.intervals.map((degree) => (suffix === 'sus2' && degree === '9' ? '2' : degree));
      expect(theirs && [...theirs].sort(), root + suffix).toEqual([...chordOf(root + suffix).degrees].sort());
    }
  });
});

describe('notes against an independent library of notes', () => {
  const NAMES: Partial<Record<Degree, string>> = { '2': 'M2', b3: 'm3', '3': 'M3', '4': 'P4', b5: 'd5', '5': 'P5', '#5': 'A5', '6': 'M6', bb7: 'd7', b7: 'm7', '7': 'M7', b9: 'm9', '9': 'M9', '#9': 'A9', '11': 'P11', '#11': 'A11', b13: 'm13', '13': 'M13' };
  const isWithinDouble = (note: string) => !/bbb|###/.test(note);
  it.each(ROOTS)('every degree above %s4, spelled and as a key', (root) => {
    for (const degree of DEGREES) {
      const name = NAMES[degree];
      const ours = noteOfDegree(`${root}4`, degree);
      if (!name || !isWithinDouble(ours)) continue;
      const theirs = teoriaNote(`${root}4`).interval(name);
      expect(theirs.toString().toLowerCase().replaceAll('x', '##'), `${root} ${degree}`).toBe(ours.toLowerCase());
      expect(theirs.midi()).toBe(keyOf(ours));
    }
  });
  it('frequencies of 88 keys', () => {
    for (let key = 21; key <= 108; key += 1) {
      const name = ['C', 'Db', 'D', 'Eb', 'E', 'F', 'Gb', 'G', 'Ab', 'A', 'Bb', 'B'][key % 12] ?? '';
      expect(teoriaNote(`${name}${Math.floor(key / 12) - 1}`).fq()).toBeCloseTo(frequencyOf(key), 6);
    }
  });
});

describe('properties, 10,000 cases each', () => {
  const voicings = ROOTS.slice(0, 12).flatMap((root) => ['maj9', 'm9', '13', '7b9b13', 'm7b5', '6/9'].flatMap((suffix) => {
    const chord = chordOf(root + suffix);
    return voicingOptions(chord, { forms: ['rootless_a', 'rootless_b', 'stack', 'shell'], register: { lowest: 36, highest: 84 } }).map((option) => ({ chord, option }));
  }));
  const voicing = fc.constantFrom(...voicings);

  it('a voicing is judged exact against itself, and every other key count is not', () => {
    fc.assert(fc.property(voicing, fc.integer({ min: 21, max: 108 }), ({ chord, option }, extra) => {
      const target = { chord, notes: option.notes };
      expect(judge(target, option.keys)).toMatchObject({ kind: 'exact', isRight: true, missing: [], foreign: [] });
      if (!option.keys.includes(extra)) expect(judge(target, [...option.keys, extra]).isRight).toBe(false);
      expect(judge(target, option.keys.slice(1)).isRight).toBe(false);
    }), { numRuns: 10_000 });
  });

  it('transposition keeps every distance', () => {
    fc.assert(fc.property(voicing, voicing, fc.integer({ min: -12, max: 12 }), (a, b, shift) => {
      const moved = (keys: readonly number[]) => keys.map((key) => key + shift);
      const [here, there] = [leadingBetween(a.option.keys, b.option.keys), leadingBetween(moved(a.option.keys), moved(b.option.keys))];
      expect([there.distance, there.largestLeap, there.topMoves, there.parallels.length]).toEqual([here.distance, here.largestLeap, here.topMoves, here.parallels.length]);
    }), { numRuns: 10_000 });
  });

  it('the inner loop counts what the full pairing counts, also with unequal numbers of voices', () => {
    fc.assert(fc.property(voicing, voicing, fc.integer({ min: 1, max: 5 }), (a, b, count) => {
      const [from, to] = [a.option.keys.slice(0, count), b.option.keys];
      expect(sortedDistance(from, to)).toBe(leadingBetween(from, to).distance);
      expect(sortedDistance(to, from)).toBe(leadingBetween(to, from).distance);
    }), { numRuns: 10_000 });
  });

  it('realise, name, realise returns the same keys', () => {
    const stacks = voicings.filter(({ option }) => ['Five-note stack', 'Shell'].includes(option.label));
    fc.assert(fc.property(fc.constantFrom(...stacks), ({ chord, option }) => {
      const reading = readingsOf(option.keys).find(({ root }) => pitchClassOf(root) === pitchClassOf(chord.root));
      expect(reading, chordName(chord)).toBeDefined();
      const named = chordOf(`${reading?.root ?? 'C'}${reading?.suffix ?? ''}`);
      const heard = option.keys.map((key) => named.degrees.find((degree) => (pitchClassOf(named.root) + semitonesOf(degree)) % 12 === key % 12));
      const octave = Math.floor(((option.keys[0] ?? 0) - pitchClassOf(named.root)) / 12) - 1;
      expect(stackOn(`${named.root}${octave}`, heard.filter((degree) => degree !== undefined)).map(({ key }) => key), chordName(chord)).toEqual(option.keys);
    }), { numRuns: 10_000 });
  });
});
