import { readSymbol, type Chord } from './chord';
import type { NoteName } from './note';
import { chordByNumeral } from './roman';

export const MOST_CHORDS = 64;
const ROOTS: readonly NoteName[] = ['C', 'Db', 'D', 'Eb', 'E', 'F', 'F#', 'Gb', 'G', 'Ab', 'A', 'Bb', 'B'];
export const PROGRESSION_KEYS = ROOTS;

/** Chords in a row as they were typed, or one sentence on the first that was not understood. */
export type ProgressionReading = { kind: 'chords'; chords: Chord[] } | { kind: 'refused'; message: string };

/**
 * Reads "Dm9 G13 | Cmaj9" or "IIm9 V13 Imaj9" in a key: chords between blanks, bar lines and commas. A dot or a slash
 * alone repeats the chord before it, as players write a bar that stays.
 */
export function readProgression(typed: string, tonic: NoteName): ProgressionReading {
  const words = typed.split(/[\s|,;]+/).filter((word) => word !== '');
  if (words.length === 0) return refused('Type chords, for example Dm9 G13 Cmaj9, or numerals, for example IIm9 V13 Imaj9.');
  if (words.length > MOST_CHORDS) return refused(`At most ${MOST_CHORDS} chords at a time.`);
  const chords: Chord[] = [];
  for (const word of words) {
    const reading = /^[./%]$/.test(word) ? repeated(chords) : oneChord(word, tonic);
    if (typeof reading === 'string') return refused(reading);
    chords.push(reading);
  }
  return { kind: 'chords', chords };
}

const refused = (message: string): ProgressionReading => ({ kind: 'refused', message });
const repeated = (chords: readonly Chord[]): Chord | string => chords.at(-1) ?? 'There is no chord before the repeat sign.';

function oneChord(word: string, tonic: NoteName): Chord | string {
  const isNumeral = /^[b#♭♯]?[IVXivx]+/.test(word) && !/^[A-G]/.test(word);
  const reading = isNumeral ? chordByNumeral(tonic, word) : readSymbol(word);
  if (reading.kind === 'chord') return reading.chord;
  return reading.kind === 'refused' ? `${word}: ${reading.message}` : `${word} has no notes to voice.`;
}
