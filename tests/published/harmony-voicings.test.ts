import { describe, expect, it } from 'vitest';
import { chordOf } from '@/lib/harmony/chord';
import { degreesOf, semitonesOf, stackOn, type Degree } from '@/lib/harmony/degree';
import { splitHands } from '@/lib/harmony/hands';
import { placementsOf } from '@/lib/harmony/target';
import { essentialDegrees, tensionUse } from '@/lib/harmony/tones';
import golden from './data/harmony-golden.json';

// The stacks come from the school's own curriculum; "root, 3, 7 lowest, the others above" is the spread voicing of MT21.
// Notes and keys: own arithmetic, agreed by two independent note libraries (harmony-golden.json, "stacks").
it.each(golden.stacks)('$stack on $root', ({ stack, root, notes, midi }) => {
  const voiced = stackOn(root, degreesOf(stack.split(':')[1] ?? ''));
  expect(voiced.map(({ note }) => note)).toEqual(notes);
  expect(voiced.map(({ key }) => key)).toEqual(midi);
});

it('the golden file holds 189 stacks', () => {
  expect(golden.stacks).toHaveLength(189);
});

const keysOf = (root: string, stack: string) => stackOn(root, degreesOf(stack)).map(({ key }) => key);
const notesOf = (root: string, stack: string) => stackOn(root, degreesOf(stack)).map(({ note }) => note).join(' ');

describe('constant shapes (CALC)', () => {
  it.each([['1-3-7-9-5', 19], ['1-11-b7-b3-5', 19], ['1-b7-3-13-9', 26], ['1-b7-3-b13-b9', 25], ['3-5-7-9', 10], ['3-13-b7-9', 10]])('%s spans %i semitones on every root', (stack, span) => {
    for (const letter of 'CDEFGAB') {
      for (const sign of ['', 'b', '#']) {
        const keys = keysOf(`${letter}${sign}3`, stack);
        expect((keys.at(-1) ?? 0) - (keys[0] ?? 0)).toBe(span);
      }
    }
  });

  it('Cb3 is key 47: the register is the octave of the root\'s letter', () => {
    expect(notesOf('Cb3', '1-11-b7-b3-5')).toBe('Cb3 Fb3 Bbb3 Ebb4 Gb4');
    expect(keysOf('Cb3', '1-11-b7-b3-5')).toEqual([47, 52, 57, 62, 66]);
  });

  it.each([['Db3', '1-b7-3-b13-b9', 'Db3 Cb4 F4 Bbb4 Ebb5'], ['Gb3', 'b3-5-b7-9', 'Bbb3 Db4 Fb4 Ab4'], ['B3', '3-13-b7-9', 'D#4 G#4 A4 C#5'], ['F#3', '1-3-7-9-5', 'F#3 A#3 E#4 G#4 C#5']])(
    '%s %s = %s', (root, stack, notes) => {
      expect(notesOf(root, stack)).toBe(notes);
    });
});

describe('place in a register', () => {
  it('takes the root register of the rung', () => {
    const places = (root: string, stack: string, place: Parameters<typeof placementsOf>[2]) => placementsOf(root, degreesOf(stack), place).map((notes) => notes.map(({ key }) => key));
    expect(places('G', '1-b7-3-13-9', { rootRegister: { lowest: 41, highest: 52 } })).toEqual([[43, 53, 59, 64, 69]]);
    expect(places('D', 'b3-5-b7-9', { register: { lowest: 50, highest: 69 } })).toEqual([[53, 57, 60, 64]]);
  });
  it('answers nothing when a voicing does not fit', () => {
    expect(placementsOf('C', degreesOf('1-b7-3-13-9'), { register: { lowest: 60, highest: 70 } })).toEqual([]);
  });
});

// TER: Terefenko, Jazz Theory, p. 47 (definition of drop 2); LilyPond's \\dropNote 2 returned the same sets.
it.each([
  ['C', '5-1-3-7', 60, [55, 60, 64, 71]], ['C', '7-3-5-1', 60, [59, 64, 67, 72]], ['C', '1-5-7-3', 60, [60, 67, 71, 76]], ['C', '3-7-1-5', 60, [64, 71, 72, 79]],
  ['D', '5-1-b3-b7', 60, [57, 62, 65, 72]], ['B', 'b3-b7-1-b5', 81, [74, 81, 83, 89]],
] as const)('drop 2 on %s, %s with the top from key %i up', (root, stack, lowest, keys) => {
  const found = placementsOf(root, degreesOf(stack), { topRegister: { lowest, highest: lowest + 29 } }).map((notes) => notes.map(({ key }) => key));
  expect(found).toContainEqual([...keys]);
});

describe('hands (CALC, table a7: no hand passes an octave)', () => {
  it.each([
    ['C3', '1-3-7-9-5', 3, 11, 5], ['C3', '1-11-b7-b3-5', 3, 10, 4], ['G2', '1-b7-3-13-9', 2, 10, 10], ['G2', '1-b7-3-b13-b9', 2, 10, 9],
  ])('%s %s splits after %i keys into %i and %i semitones', (...[root, stack, count, leftSpan, rightSpan]) => {
    expect(splitHands(keysOf(root, stack), 12)).toMatchObject({ left: keysOf(root, stack).slice(0, count), leftSpan, rightSpan, advice: 'fits' });
  });
  it('splits a rootless form between the hands for a small reach', () => {
    expect(splitHands([53, 57, 60, 64], 12)).toMatchObject({ right: [], advice: 'fits' });
    expect(splitHands([53, 57, 60, 64], 10)).toMatchObject({ left: [53, 57, 60], right: [64], advice: 'fits' });
  });
  it('drops the plain fifth before it asks for a roll, and never for a stretch', () => {
    expect(splitHands([48, 52, 59, 62, 67], 7, 67)).toMatchObject({ left: [48, 52], right: [59, 62], advice: 'drop_fifth' });
    expect(splitHands([43, 53, 59, 64, 69], 7)).toMatchObject({ advice: 'roll' });
  });
  it('is calm about nothing', () => {
    expect(splitHands([], 12)).toMatchObject({ span: 0, advice: 'fits' });
  });
});

describe('essential tones (MT21 Guide Tones, Voicings; A3 second half CP)', () => {
  it.each<[string, string]>([['Cmaj9', '3 7'], ['G13', '3 b7'], ['Bm7b5', 'b3 b5 b7'], ['C7sus4', '4 b7'], ['C6/9', '3 6'], ['C7#5', '3 #5 b7']])('%s cannot do without %s', (symbol, degrees) => {
    expect(essentialDegrees(chordOf(symbol)).join(' ')).toBe(degrees);
  });
  it('G7 and Db7 share third and seventh (MT21 tritone substitute)', () => {
    expect(keysOf('G3', '3-b7').map((key) => key % 12).sort((a, b) => a - b)).toEqual(keysOf('Db3', '3-b7').map((key) => key % 12).sort((a, b) => a - b));
  });
});

// Encyclopedia article "Avoid note" (older revision, citing Nettles and Haerle), modes of C major; the dominant exception is CP.
describe('avoid notes', () => {
  it.each<[string, Degree, string]>([
    ['Cmaj7', '11', 'avoid'], ['Cmaj7', '9', 'available'], ['Cmaj7', '13', 'available'], ['Cmaj7', '#11', 'available'],
    ['Dm7', '9', 'available'], ['Dm7', '11', 'available'], ['Dm7', '13', 'caution'], ['Em7', 'b9', 'avoid'], ['Em7', 'b13', 'avoid'], ['Em7', '11', 'available'],
    ['G7', '11', 'avoid'], ['G7', '9', 'available'], ['G7', '13', 'available'], ['G7', 'b9', 'available'],
    ['Bm7b5', 'b9', 'avoid'], ['Bm7b5', '11', 'available'], ['Bm7b5', 'b13', 'available'], ['G13', '13', 'member'],
  ])('%s with %s: %s', (symbol, degree, use) => {
    expect(tensionUse(chordOf(symbol), degree)).toBe(use);
  });
  it('a natural 11 is a half step above a major third, a whole step above a minor one (A12)', () => {
    expect(semitonesOf('11') - 12 - semitonesOf('3')).toBe(1);
    expect(semitonesOf('11') - 12 - semitonesOf('b3')).toBe(2);
  });
});
