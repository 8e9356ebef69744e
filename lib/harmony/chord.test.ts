import fc from 'fast-check';
import { expect, it } from 'vitest';
import { LONGEST_SYMBOL, chordOf, readSymbol, spelledMembers } from './chord';
import { semitonesOf } from './degree';
import { judge } from './judge';
import { keyOf, pitchClassOf } from './note';
import { targetOf } from './target';

const ROOTS = [...'CDEFGAB'].flatMap((letter) => [letter, `${letter}b`, `${letter}#`]);
const SUFFIXES = ['', 'm', 'dim', 'aug', '5', 'sus2', 'sus4', '6', 'm6', '6/9', 'm6/9', '7', 'maj7', 'm7', 'm7b5', 'dim7', 'm(maj7)', '7#5', '7b5', '9', 'maj9', 'm9',
  '11', 'm11', '13', 'maj13', 'm13', '7b9', '7#9', '7#11', '7b13', '7b9b13', '13b9', '13sus4', '9sus4', 'maj7#11', 'maj9#11', 'add9', 'madd9', '(b9)', '7alt', '6/9#11', 'm(maj7)b5', '7sus4b9'];

it('writes every chord in a spelling that it reads back as the same chord', () => {
  fc.assert(fc.property(fc.constantFrom(...ROOTS), fc.constantFrom(...SUFFIXES), (root, suffix) => {
    const chord = chordOf(root + suffix);
    expect(chordOf(chord.root + chord.suffix)).toEqual(chord);
    expect(chord.suffix).toBe(suffix);
  }), { numRuns: 400 });
});

it('spells every member on the letter of its degree and on the right key', () => {
  fc.assert(fc.property(fc.constantFrom(...ROOTS), fc.constantFrom(...SUFFIXES), (root, suffix) => {
    const chord = chordOf(root + suffix);
    spelledMembers(chord).forEach((note, at) => {
      const degree = chord.degrees[at] ?? '1';
      expect(pitchClassOf(note)).toBe((pitchClassOf(root) + semitonesOf(degree)) % 12);
      const letters = (Number(degree.replace(/\D/g, '')) - 1) % 7;
      expect('CDEFGAB'.indexOf(note.charAt(0))).toBe(('CDEFGAB'.indexOf(root.charAt(0)) + letters) % 7);
    });
  }), { numRuns: 400 });
});

it('answers any text with a chord, no chord or a sentence, and never throws', () => {
  fc.assert(fc.property(fc.string({ maxLength: LONGEST_SYMBOL + 8, unit: 'grapheme' }), (typed) => {
    const reading = readSymbol(typed);
    if (reading.kind === 'refused') expect(reading.message.length).toBeGreaterThan(10);
    if (reading.kind === 'chord') expect(reading.chord.degrees.length).toBeGreaterThan(1);
  }), { numRuns: 1000 });
});

it('judges the same in every key: verdicts do not change under transposition', () => {
  const inC = targetOf({ symbol: 'Cmaj9', stack: '1-3-7-9-5', rootRegister: { lowest: 48, highest: 48 } });
  fc.assert(fc.property(fc.integer({ min: 0, max: 11 }), fc.uniqueArray(fc.integer({ min: 45, max: 72 }), { maxLength: 6 }), (up, played) => {
    const root = ['C', 'Db', 'D', 'Eb', 'E', 'F', 'Gb', 'G', 'Ab', 'A', 'Bb', 'B'][up] ?? 'C';
    const there = targetOf({ symbol: `${root}maj9`, stack: '1-3-7-9-5', rootRegister: { lowest: keyOf(`${root}3`), highest: keyOf(`${root}3`) } });
    const [here, moved] = [judge(inC, played), judge(there, played.map((key) => key + up))];
    expect([moved.kind, moved.missing, moved.isClean, moved.doubled.map(({ degree }) => degree)]).toEqual([here.kind, here.missing, here.isClean, here.doubled.map(({ degree }) => degree)]);
  }), { numRuns: 300 });
});
