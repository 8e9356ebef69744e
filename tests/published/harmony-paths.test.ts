import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { FormName } from '@/lib/harmony/forms';
import { smoothestPath, smoothestVoicings, voicingOptions, type VoicingOption } from '@/lib/harmony/path-finder';
import { chordByNumeral, chordsOfNumerals, PROGRESSIONS, tritoneSubstitute, type ProgressionName } from '@/lib/harmony/roman';
import { chordOf } from '@/lib/harmony/chord';
import { chordName } from '@/lib/harmony/chord-name';
import { pitchClassOf } from '@/lib/harmony/note';
import { sortedDistance } from '@/lib/harmony/voice-leading';

/** The optima were found by exhaustive search outside this program, in each of twelve keys. Ties are common: costs are compared, never paths. */
const KEYS = ['C', 'Db', 'D', 'Eb', 'E', 'F', 'Gb', 'G', 'Ab', 'A', 'Bb', 'B'];
const ROOTLESS: FormName[] = ['rootless_a', 'rootless_b'];
const WINDOW = { forms: ROOTLESS, register: { lowest: 48, highest: 72 } };
const pathIn = (key: string, name: ProgressionName, limits = WINDOW) => smoothestVoicings(chordsOfNumerals(key, PROGRESSIONS[name].numerals), limits);

describe('the smoothest path', () => {
  it.each(KEYS)('two-five-one in %s moves 6 semitones, also in the narrow window', (key) => {
    expect(pathIn(key, 'two_five_one')?.cost).toBe(6);
    expect(pathIn(key, 'two_five_one', { forms: ROOTLESS, register: { lowest: 52, highest: 69 } })?.cost).toBe(6);
  });
  it('the lowest start alternates the forms: A-B-A in C, B-A-B in Eb', () => {
    expect(pathIn('C', 'two_five_one')?.voicings.map(({ label }) => label)).toEqual(['Rootless A', 'Rootless B', 'Rootless A']);
    expect(pathIn('Eb', 'two_five_one')?.voicings.map(({ label }) => label)).toEqual(['Rootless B', 'Rootless A', 'Rootless B']);
  });
  it.each(KEYS)('minor two-five-one in %s moves 8', (key) => {
    expect(pathIn(key, 'minor_two_five_one')?.cost).toBe(8);
  });
  it.each(['C', 'F', 'Bb'])('the turnaround in %s moves 22', (key) => {
    expect(pathIn(key, 'turnaround')?.cost).toBe(22);
  });
  it('the blues in F moves 40', () => {
    expect(pathIn('F', 'blues')?.cost).toBe(40);
  });
  it('the substituted two-five-one moves 8', () => {
    expect(pathIn('C', 'substituted')?.cost).toBe(8);
  });
  it('is nothing where a chord fits nowhere', () => {
    expect(pathIn('C', 'two_five_one', { forms: ROOTLESS, register: { lowest: 60, highest: 64 } })).toBeNull();
    expect(smoothestPath([])).toBeNull();
  });
});

/** Every path, one by one. */
function exhaustiveCost(options: readonly VoicingOption[][]): number {
  const walk = (at: number, keys: readonly number[]): number =>
    at === options.length ? 0 : Math.min(...(options[at] ?? []).map((option) => (at === 0 ? 0 : sortedDistance(keys, option.keys)) + walk(at + 1, option.keys)));
  return walk(0, []);
}

it('equals exhaustive search on short progressions (property, 10,000 cases)', () => {
  const suffix = fc.constantFrom('maj9', 'm9', '13', '7b9b13', 'm7b5', 'm6/9', 'dim7', '6', '7#9', '13sus4');
  const chord = fc.tuple(fc.constantFrom(...KEYS), suffix).map(([root, kind]) => chordOf(root + kind));
  const forms = fc.constantFrom<FormName[]>(ROOTLESS, ['shell', 'shell_open'], ['rootless_a', 'shell'], ['drop_2']);
  const memo = new Map<string, VoicingOption[]>();
  fc.assert(fc.property(fc.array(chord, { minLength: 2, maxLength: 4 }), forms, (chords, chosen) => {
    const options = chords.map((one) => {
      const name = chordName(one) + chosen.join();
      const found = memo.get(name) ?? voicingOptions(one, { forms: chosen, register: { lowest: 45, highest: 72 } });
      memo.set(name, found);
      return found;
    });
    expect(smoothestPath(options)?.cost ?? Number.POSITIVE_INFINITY).toBe(exhaustiveCost(options));
  }), { numRuns: 10_000 });
});

it('a voicing the hand does not reach is not offered', () => {
  const options = (reachSemitones: number) => voicingOptions(chordOf('Cmaj7'), { forms: ['shell_open'], register: { lowest: 48, highest: 72 }, reachSemitones });
  expect(options(16)).toHaveLength(1);
  expect(options(4)).toHaveLength(0);
});

describe('numerals', () => {
  const named = (key: string, numeral: string) => {
    const reading = chordByNumeral(key, numeral);
    return reading.kind === 'chord' ? chordName(reading.chord) : reading.message;
  };
  it.each([['Gb', 'IIm7', 'A♭m7'], ['Gb', 'V7', 'D♭7'], ['C', 'bII7', 'D♭7'], ['E', 'bII7', 'F7'], ['F', '#IVm7b5', 'Bm7♭5'], ['Cb', 'bII7', 'D♭♭7'], ['D', 'iiø7', 'Em7♭5'], ['C', 'ii7', 'Dm7'], ['C', 'i6/9', 'Cm6/9'], ['C', 'imaj7', 'Cm(maj7)'], ['A', 'vii°7', 'G♯dim7']])('in %s %s is %s', (key, numeral, name) => {
    expect(named(key, numeral)).toBe(name);
  });
  it('says in a sentence what is no step', () => {
    expect(named('C', 'IIX7')).toMatch(/not a step of the scale/);
    expect(named('C', 'V7foo')).toMatch(/was not understood/);
  });
  it('the tritone substitute shares third and seventh (MT21), in every key', () => {
    for (const key of KEYS) {
      const dominant = chordOf(`${key}7`);
      const guides = (root: string, degrees: number[]) => degrees.map((step) => (pitchClassOf(root) + step) % 12).sort((a, b) => a - b);
      expect(guides(tritoneSubstitute(dominant).root, [4, 10])).toEqual(guides(key, [4, 10]));
    }
    expect(chordName(tritoneSubstitute(chordOf('G7')))).toBe('D♭7');
  });
  it('dominants with every second one substituted: E7 Eb7 D7 Db7 (MT21)', () => {
    expect(chordsOfNumerals('C', PROGRESSIONS.substituted_dominants.numerals).map((chord) => chordName(chord))).toEqual(['E7', 'E♭7', 'D7', 'D♭7']);
  });
});
