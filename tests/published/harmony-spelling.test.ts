import { describe, expect, it } from 'vitest';
import { chordOf, readSymbol, spelledMembers } from '@/lib/harmony/chord';
import { keyOf, pitchClassOf } from '@/lib/harmony/note';
import { semitonesOf } from '@/lib/harmony/degree';
import { heardDegrees } from '@/lib/harmony/tones';
import golden from './data/harmony-golden.json';

// harmony-golden.json: chord spellings printed by GNU LilyPond 2.24.1 in chordmode (program GPL-3+, its output is ours).
// OMT: Open Music Theory v1, "Triads and seventh chords". MT21: Music Theory for the 21st-Century Classroom. LY: LilyPond.
const spelled = (symbol: string) => spelledMembers(chordOf(symbol)).join(' ');

it.each(golden.chords.map(({ root, quality, notes, semitones }) => ({ symbol: root + (quality === '13.11' ? '13(11)' : quality), notes, semitones })))(
  '$symbol is spelled as LilyPond prints it', ({ symbol, notes, semitones }) => {
    const chord = chordOf(symbol);
    expect(spelledMembers(chord)).toEqual(notes);
    expect(chord.degrees.map(semitonesOf)).toEqual(semitones);
  });

it('the golden file holds 530 chords', () => {
  expect(golden.chords).toHaveLength(530);
});

describe('single checks', () => {
  it.each([
    ['Cmaj7', 'C E G B', 'OMT'], ['Dm7', 'D F A C', 'OMT'], ['G7', 'G B D F', 'OMT'], ['Bm7b5', 'B D F A', 'OMT'], ['Bdim7', 'B D F Ab', 'OMT'],
    ['Bm7', 'B D F# A', 'MT21'], ['C#m7b5', 'C# E G B', 'MT21'], ['Am7b5', 'A C Eb G', 'MT21'], ['Emaj7', 'E G# B D#', 'MT21'],
    ['Gbmaj7', 'Gb Bb Db F', 'LY'], ['F#maj7', 'F# A# C# E#', 'LY'], ['Db7', 'Db F Ab Cb', 'LY'], ['C#7', 'C# E# G# B', 'LY'], ['Abm7', 'Ab Cb Eb Gb', 'LY'],
    ['Abm7b5', 'Ab Cb Ebb Gb', 'LY'], ['Ebm7b5', 'Eb Gb Bbb Db', 'LY'], ['Ebdim7', 'Eb Gb Bbb Dbb', 'LY'], ['Dbm7b5', 'Db Fb Abb Cb', 'LY'],
    ['Dbdim7', 'Db Fb Abb Cbb', 'LY'], ['Gbm7', 'Gb Bbb Db Fb', 'LY'], ['Cdim7', 'C Eb Gb Bbb', 'LY'], ['C#dim7', 'C# E G Bb', 'LY'], ['F#dim7', 'F# A C Eb', 'LY'],
    ['Cbdim7', 'Cb Ebb Gbb Bbbb', 'LY'], ['Cbmaj7', 'Cb Eb Gb Bb', 'LY'], ['Cb7', 'Cb Eb Gb Bbb', 'LY'], ['Cbm7', 'Cb Ebb Gb Bbb', 'LY'],
    ['Fbmaj7', 'Fb Ab Cb Eb', 'LY'], ['Fb7', 'Fb Ab Cb Ebb', 'LY'], ['E#m7', 'E# G# B# D#', 'LY'], ['B#7', 'B# D## F## A#', 'LY'],
    ['D#m7b5', 'D# F# A C#', 'LY'], ['A#m7b5', 'A# C# E G#', 'LY'], ['F#7', 'F# A# C# E', 'LY'], ['Gb7', 'Gb Bb Db Fb', 'LY'], ['F#m11', 'F# A C# E G# B', 'LY'],
    ['Bbmaj9#11', 'Bb D F A C E', 'LY'], ['G7b9b13', 'G B D F Ab Eb', 'LY'], ['Db7b9b13', 'Db F Ab Cb Ebb Bbb', 'LY'], ['Gb7b9', 'Gb Bb Db Fb Abb', 'LY'],
    ['C6', 'C E G A', 'LY'], ['Cm6', 'C Eb G A', 'LY'], ['C6/9', 'C E G A D', 'LY; MT21'], ['Cm(maj7)', 'C Eb G B', 'LY; MT21'], ['C7#5', 'C E G# Bb', 'LY; MT21'],
    ['C7sus', 'C F G Bb', 'MT21'], ['D11', 'D F# A C E G', 'MT21'], ['Dmaj11', 'D F# A C# E G', 'MT21'], ['C9(13)', 'C E G Bb D A', 'MT21'],
    ['C13', 'C E G Bb D A', 'LY: the 11 is removed from a 13 chord'], ['C13(11)', 'C E G Bb D F A', 'MT21 literal C13'],
    ['E7(#11)(#9)(#5)', 'E G# B# D F## A#', 'MT21 worked example'],
    // What the note library behind this gets wrong, put right here.
    ['C7b5b9', 'C E Gb Bb Db', 'degrees as written'], ['C7b9b5', 'C E Gb Bb Db', 'degrees as written'], ['Cm7#5', 'C Eb G# Bb', 'degrees as written'],
    ['Cm9b5', 'C Eb Gb Bb D', 'degrees as written'], ['C11', 'C E G Bb D F', 'MT21 D11'], ['Cm13', 'C Eb G Bb D F A', 'LY'], ['C7b13', 'C E G Bb Ab', 'MT21: b13 implies the natural 5'],
  ])('%s = %s (%s)', (symbol, notes) => {
    expect(spelled(symbol)).toBe(notes);
  });

  it('alt fixes root, third and seventh only (MT21)', () => {
    expect(chordOf('C7alt')).toMatchObject({ degrees: ['1', '3', 'b7'], isAlt: true });
  });

  it('Gb and F# chords, Db and C# chords are the same keys (LY)', () => {
    expect(spelledMembers(chordOf('Gbmaj7')).map(pitchClassOf)).toEqual(spelledMembers(chordOf('F#maj7')).map(pitchClassOf));
    expect(spelledMembers(chordOf('Db7')).map(pitchClassOf)).toEqual(spelledMembers(chordOf('C#7')).map(pitchClassOf));
  });

  it.each([['F/G', 'G', 'F A C'], ['Dm7/G', 'G', 'D F A C'], ['Cmaj7/E', 'E', 'C E G B'], ['Emaj7/G#', 'G#', 'E G# B D#']])(
    '%s has the bass %s under %s (MT21 slash chords)', (symbol, bass, members) => {
      expect(chordOf(symbol).bass).toBe(bass);
      expect(spelled(symbol)).toBe(members);
    });
});

describe('what a heard key is called (MT21: 6 or 13, 11 versus sus, b5 versus #11)', () => {
  const over = (root: string, notes: string) => heardDegrees(new Set(notes.split(' ').map((note) => (keyOf(`${note}4`) - keyOf(`${root}4`) + 12) % 12)));
  it.each([
    ['Eb', 'Eb G Bb Db Gb A', '1 3 5 b7 #9 #11'], ['F', 'F Bb Eb Gb D', '1 4 b7 b9 13'], ['C', 'C E Bb F#', '1 3 b7 b5'], ['C', 'C E G Bb F#', '1 3 5 b7 #11'],
    ['C', 'C E G A', '1 3 5 6'], ['C', 'C E G Bb A', '1 3 5 b7 13'], ['C', 'C F G', '1 4 5'], ['C', 'C E F G', '1 3 11 5'], ['C', 'C Eb Gb A', '1 b3 b5 bb7'],
  ])('over %s, %s is %s', (root, notes, degrees) => {
    expect(over(root, notes)).toEqual(degrees.split(' '));
  });
});

it('every chord of the table is read, none comes back empty', () => {
  for (const { root, quality } of golden.chords) expect(readSymbol(root + (quality === '13.11' ? '13(11)' : quality)).kind).toBe('chord');
});
