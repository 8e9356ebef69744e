import { describe, expect, it } from 'vitest';
import { noteOfDegree, semitonesOf, type Degree } from '@/lib/harmony/degree';
import { frequencyOf, isKeyNumber, keyOf, plainKeyName } from '@/lib/harmony/note';
import golden from './data/harmony-golden.json';

// Sources. OMT: Open Music Theory v1 (CC BY-SA 4.0), "Pitches", "Intervals". MT21: R. Hutchinson, Music Theory for the
// 21st-Century Classroom (GFDL). ISO16: ISO 16:1975. OEIS: A329207 to A329218. MTU: B. Suits, Physics of Music Notes,
// "Equations for the Frequency Table". CRC: CRC Handbook, equal tempered scale, table 1. CALC: own arithmetic.
describe('keys and frequencies', () => {
  it.each([
    ['C4', 60, 'OMT pitches; MT21'], ['A4', 69, 'ISO16'], ['A0', 21, 'CRC'], ['C8', 108, 'CRC'], ['Cb4', 59, 'OMT: the octave follows the letter'],
    ['B#3', 60, 'OMT rule; CALC'], ['Cb5', 71, 'CALC'], ['E#4', 65, 'CALC'], ['Fb4', 64, 'CALC'], ['Abb4', 67, 'CALC'], ['Bbbb4', 68, 'CALC'],
    ['C###4', 63, 'CALC'], ['C0', 12, 'CRC'], ['C-1', 0, 'CALC'], ['G9', 127, 'CALC'],
  ])('%s is key %i (%s)', (note, key) => {
    expect(keyOf(note)).toBe(key);
  });

  it.each([
    ['C4', 261.63], ['C#4', 277.18], ['D4', 293.66], ['Eb4', 311.13], ['E4', 329.63], ['F4', 349.23], ['F#4', 369.99], ['G4', 392], ['Ab4', 415.3],
    ['A4', 440], ['Bb4', 466.16], ['B4', 493.88], ['C2', 65.41], ['C3', 130.81], ['D3', 146.83], ['E3', 164.81], ['F3', 174.61], ['G3', 196], ['A3', 220],
    ['B3', 246.94], ['C5', 523.25], ['D5', 587.33], ['E5', 659.26], ['C0', 16.35], ['C-1', 8.18], ['G9', 12543.85], ['A0', 27.5], ['C8', 4186.01], ['Cb4', 246.94],
  ])('%s sounds at %f Hz (OEIS, CRC, MTU formula)', (note, hertz) => {
    expect(frequencyOf(keyOf(note))).toBeCloseTo(hertz, 2);
  });

  it('agrees with all 88 piano keys of the stored table (formula MTU)', () => {
    for (const [key, hertz] of Object.entries(golden.freq)) expect(frequencyOf(Number(key))).toBeCloseTo(hertz, 3);
    expect(Object.keys(golden.freq)).toHaveLength(88);
  });

  it.each([[-1], [128], [60.5], [Number.NaN]])('refuses key %d', (key) => {
    expect(isKeyNumber(key)).toBe(false);
  });

  it('refuses a name that is no key', () => {
    expect(() => keyOf('H4')).toThrow('not a key');
    expect(() => keyOf('')).toThrow('not a key');
  });

  it('calls key 60 C4', () => {
    expect(plainKeyName(60)).toBe('C4');
    expect(plainKeyName(58)).toBe('B♭3');
  });
});

describe('degrees', () => {
  it.each<[Degree, number]>([
    ['9', 14], ['b9', 13], ['#9', 15], ['11', 17], ['#11', 18], ['b13', 20], ['13', 21], ['bb7', 9], ['#5', 8], ['b5', 6], ['7', 11], ['b7', 10], ['6', 9], ['4', 5],
  ])('%s is %i semitones above the root (MT21: 9 is 2 an octave higher, 11 = 4, 13 = 6; OMT intervals)', (degree, semitones) => {
    expect(semitonesOf(degree)).toBe(semitones);
  });

  it('spells an augmented ninth with its own letter (OMT: 15 semitones; spelling CALC)', () => {
    expect(noteOfDegree('G4', '#9')).toBe('A#5');
  });
});
