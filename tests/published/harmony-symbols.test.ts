import { describe, expect, it } from 'vitest';
import { chordOf, readSymbol } from '@/lib/harmony/chord';
import { chordName } from '@/lib/harmony/chord-name';

// OMT, MT21 as in harmony-spelling.test.ts. MXL: W3C MusicXML 4.0. UCD: UnicodeData 15 (look-alike signs). CP: common practice.
const SAME: Record<string, { spellings: string[]; degrees: string; source: string }> = {
  'major seventh': { spellings: ['Cmaj7', 'CMaj7', 'Cma7', 'CM7', 'C\u25b37', 'C\u03947', 'C\u22067', ' Cmaj7 ', 'C maj7'], degrees: '1 3 5 7', source: 'OMT, MT21, MXL, UCD' },
  'minor seventh': { spellings: ['Cm7', 'Cmin7', 'Cmi7', 'C-7', 'C\u22127', 'C\u20137'], degrees: '1 b3 5 b7', source: 'MT21, MXL' },
  'half-diminished': { spellings: ['Cm7b5', 'Cm7(b5)', 'C-7b5', 'C\u00f87', 'C\u00d87', 'C\u22057', 'C\u29b07', 'Cmin7b5'], degrees: '1 b3 b5 b7', source: 'MT21, MXL, UCD, OMT' },
  'diminished seventh': { spellings: ['Cdim7', 'Co7', 'C\u00b07', 'C\u00ba7'], degrees: '1 b3 b5 bb7', source: 'OMT, MXL' },
  'augmented': { spellings: ['Caug', 'C+'], degrees: '1 3 #5', source: 'OMT' },
  'augmented seventh': { spellings: ['C7#5', 'C+7', 'Caug7', 'C7(#5)'], degrees: '1 3 #5 b7', source: 'MT21' },
  'minor-major': { spellings: ['Cm(maj7)', 'CmMaj7', 'CmM7', 'C-maj7', 'C-\u25b37', 'Cmin(maj7)'], degrees: '1 b3 5 7', source: 'MT21, MXL' },
  'sus': { spellings: ['Csus', 'Csus4'], degrees: '1 4 5', source: 'MT21' },
  'seventh sus': { spellings: ['C7sus', 'C7sus4'], degrees: '1 4 5 b7', source: 'MT21' },
  'ninth sus': { spellings: ['C9sus', 'C9sus4'], degrees: '1 4 5 b7 9', source: 'MXL a4 row 9sus' },
  'thirteenth sus': { spellings: ['C13sus', 'C13sus4'], degrees: '1 4 5 b7 9 13', source: 'MXL names 13sus' },
  'six nine': { spellings: ['C6/9', 'C69', 'C6(9)', 'C6add9'], degrees: '1 3 5 6 9', source: 'MT21, CP' },
  'flat nine': { spellings: ['C7b9', 'C7-9', 'C7(b9)', 'C7\u266d9', 'C7(-9)'], degrees: '1 3 5 b7 b9', source: 'MT21: minus = flat' },
  'sharp nine': { spellings: ['C7#9', 'C7+9', 'C7(#9)', 'C7\u266f9'], degrees: '1 3 5 b7 #9', source: 'MT21: plus = sharp' },
  'two alterations': { spellings: ['C7b9b13', 'C7(b9,b13)', 'C7(b9b13)', 'C7(b9 b13)', 'C7(b9)(b13)'], degrees: '1 3 5 b7 b9 b13', source: 'MT21' },
  'added ninth': { spellings: ['Cadd9', 'C2', 'Cadd2', 'C(add9)'], degrees: '1 3 5 9', source: 'MT21' },
  'altered': { spellings: ['C7alt', 'Calt'], degrees: '1 3 b7', source: 'MT21' },
};

describe.each(Object.entries(SAME))('%s', (_name, { spellings, degrees, source }) => {
  it.each(spellings)(`%s (${source})`, (spelling) => {
    const chord = chordOf(spelling);
    expect(chord.root).toBe('C');
    expect(chord.degrees.join(' ')).toBe(degrees);
    expect(chord.suffix).toBe(chordOf(spellings[0] ?? '').suffix);
    expect(chord.bass).toBeNull();
  });
});

describe('where the accidental belongs (MT21 gives this triple)', () => {
  it.each([['Cb9', 'Cb', '1 3 5 b7 9'], ['C(b9)', 'C', '1 3 5 b9'], ['C7(b9)', 'C', '1 3 5 b7 b9']])('%s', (symbol, root, degrees) => {
    expect(chordOf(symbol)).toMatchObject({ root, degrees: degrees.split(' ') });
  });

  it.each([['C♭maj7', 'Cb'], ['F♯m7', 'F#'], ['B𝄫7', 'Bbb'], ['Ebb7', 'Ebb'], ['F𝄪m7', 'F##'], ['Fxm7', 'F##'], ['F##m7', 'F##']])('%s has the root %s (UCD)', (symbol, root) => {
    expect(chordOf(symbol).root).toBe(root);
  });

  it('C-7 is minor, C7-9 has a flat nine (MT21)', () => {
    expect(chordOf('C-7').suffix).toBe('m7');
    expect(chordOf('C7-9').suffix).toBe('7b9');
  });

  it('the slash of 6/9 is no bass, the one after it is', () => {
    expect(chordOf('C6/9').bass).toBeNull();
    expect(chordOf('C6/9/E')).toMatchObject({ suffix: '6/9', bass: 'E' });
  });
});

it.each(['N.C.', 'NC', 'n.c.', 'N.C'])('%s is "no chord", not an error', (typed) => {
  expect(readSymbol(typed)).toEqual({ kind: 'no_chord' });
});

it.each([
  ['', 'Type a chord'], ['   ', 'Type a chord'], ['H7', 'German'], ['c7', 'capital letter: C7'], ['Foo', 'not understood'], ['Cmaj7 junk', '“junk” was not understood after Cmaj7'],
  ['Cmaj7x', '“x” was not understood'], ['C7(b9', 'not closed'], ['C7)b9(', 'do not match'], ['C/', 'bass note'], ['C/9', 'not understood'], ['C/h', 'capital letter'],
  ['C7/e', 'capital letter'], ['C+9', 'two ways'], ['C7b11', 'not understood'], ['C7#13', 'not understood'], ['Cm7sus', 'not understood'], ['Cm7alt', 'not understood'], ['Cbbb7', 'not understood'],
  ['漢', 'letter from A to G'], ['é7', 'letter from A to G'], ['<b>C</b>', 'letter from A to G'], ["C7'; DROP TABLE rung", 'not understood'], [`C${'7'.repeat(400)}`, 'at most 32'], ['undefined', 'letter from A to G'],
])('%s is refused with a sentence', (typed, sentence) => {
  const reading = readSymbol(typed);
  expect(reading.kind).toBe('refused');
  expect(reading.kind === 'refused' && reading.message).toContain(sentence);
});

it.each([
  ['G7b9b13', 'G7(♭9 ♭13)', 'G7(♭9 ♭13)'], ['Bbm7b5', 'B♭m7♭5', 'B♭ø7'], ['F#-7', 'F♯m7', 'F♯−7'], ['CM7/E', 'Cmaj7/E', 'C△7/E'], ['Edim7', 'Edim7', 'E°7'],
  ['Cm(maj7)', 'Cm(maj7)', 'C−△7'], ['C(b9)', 'C(♭9)', 'C(♭9)'], ['Dm11', 'Dm11', 'D−11'],
])('%s is printed as %s in words and %s in signs', (typed, words, signs) => {
  expect(chordName(chordOf(typed), 'words')).toBe(words);
  expect(chordName(chordOf(typed), 'signs')).toBe(signs);
});
