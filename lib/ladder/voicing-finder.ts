import * as z from 'zod';
import { FORM_NAMES } from '../harmony/forms';
import { changeWords, seventhResolution } from '../harmony/leading-words';
import { smoothestVoicings } from '../harmony/path-finder';
import { PROGRESSION_KEYS, readProgression } from '../harmony/progression';
import type { Score } from '../harmony/score';
import type { Chord } from '../harmony/chord';
import type { NoteName, KeyNumber } from '../harmony/note';
import { printedDegree, type VoicedNote } from '../harmony/degree';
import { chordName, type ChordStyle } from '../harmony/chord-name';

const key = z.coerce.number().int();

/** What is asked of the finder: chords, in which forms, where on the keyboard, for which hand. It fits into an address, so that a result can be sent to somebody. */
export const voicingQuerySchema = z.object({
  chords: z.string().max(600).default('IIm9 V13 Imaj9'),
  tonic: z.string().refine((text) => PROGRESSION_KEYS.includes(text)).catch('C'),
  forms: z.string().transform((text) => FORM_NAMES.filter((form) => text.split(',').includes(form))).catch(['rootless_a', 'rootless_b']).default(['rootless_a', 'rootless_b']),
  lowest: key.min(21).max(96).catch(48).default(48),
  highest: key.min(33).max(108).catch(72).default(72),
  reach: key.min(5).max(19).catch(12).default(12),
  tempo: key.min(30).max(240).catch(80).default(80),
});
export type VoicingQuery = z.output<typeof voicingQuerySchema>;

export type FoundVoicing = { name: string; form: string; degrees: string; notes: NoteName[]; keys: KeyNumber[]; voiced: VoicedNote[]; chord: Chord; /** from the chord before */ moves: string[]; movedSemitones: number; seventh: string | null; hasParallels: boolean };
export type FinderResult = { kind: 'found'; voicings: FoundVoicing[]; cost: number } | { kind: 'refused'; message: string };

/** The smoothest voicings for the asked chords, with every move in words; or one sentence on what stands in the way. */
export function findVoicings({ chords: typed, tonic, forms, lowest, highest, reach }: VoicingQuery, style: ChordStyle): FinderResult {
  const reading = readProgression(typed, tonic);
  if (reading.kind === 'refused') return reading;
  if (forms.length === 0) return { kind: 'refused', message: 'Choose at least one form.' };
  if (highest - lowest < 12) return { kind: 'refused', message: 'The register is narrower than an octave; widen it.' };
  const path = smoothestVoicings(reading.chords, { forms, register: { lowest, highest }, reachSemitones: reach });
  if (!path) return { kind: 'refused', message: whatDoesNotFit(reading.chords, { forms, lowest, highest, reach }, style) };
  const sounding = path.voicings.flatMap((option, at) => {
    const chord = reading.chords[at];
    return chord ? [{ option, change: path.changes[at - 1], target: { chord, notes: option.notes }, keys: option.keys }] : [];
  });
  return {
    kind: 'found', cost: path.cost,
    voicings: sounding.map((one, at): FoundVoicing => {
      const { option, change, target, keys } = one;
      const before = sounding[at - 1];
      return {
        name: chordName(target.chord, style), form: option.label, chord: target.chord, keys, notes: option.notes.map(({ note }) => note), voiced: option.notes, degrees: option.notes.map(({ degree }) => printedDegree(degree)).join(' '),
        moves: before ? changeWords(before, one) : [], movedSemitones: change?.distance ?? 0, seventh: before ? (seventhResolution(before, one, style)?.words ?? null) : null, hasParallels: (change?.parallels.length ?? 0) > 0,
      };
    }),
  };
}

function whatDoesNotFit(chords: readonly Chord[], { forms, lowest, highest, reach }: Pick<VoicingQuery, 'forms' | 'lowest' | 'highest' | 'reach'>, style: ChordStyle): string {
  const alone = chords.find((chord) => smoothestVoicings([chord], { forms, register: { lowest, highest }, reachSemitones: reach }) === null);
  return `${alone ? chordName(alone, style) : 'One chord'} has none of these forms inside this register and reach. Widen the register or choose another form.`;
}

/** The result as a score, a chord a bar, for the stave and for files. */
export const scoreOfFinder = ({ tonic, tempo, chords }: VoicingQuery, voicings: readonly FoundVoicing[]): Score => ({
  title: `Voicings: ${chords}`.slice(0, 120), tonic, beatsPerMinute: tempo, beatsPerBar: 4, bars: voicings.map(({ chord, notes }) => ({ chord, notes })),
});
