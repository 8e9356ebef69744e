import { Interval, Note } from 'tonal';
import { inOctave, keyOf, type KeyNumber, type NoteName } from './note';

/**
 * Each degree of a chord as players name it, with its interval above the root. 2, 4 and 6 stand for a third or a
 * seventh that is not there; 9, 11 and 13 are the same letters above a seventh (Hutchinson, Music Theory for the
 * 21st-Century Classroom, "Introduction to Jazz Theory").
 */
const INTERVALS = {
  '1': '1P', '2': '2M', b3: '3m', '3': '3M', '4': '4P', b5: '5d', '5': '5P', '#5': '5A', '6': '6M', bb7: '7d', b7: '7m', '7': '7M',
  b9: '9m', '9': '9M', '#9': '9A', '11': '11P', '#11': '11A', b13: '13m', '13': '13M',
} as const;

export type Degree = keyof typeof INTERVALS;
export const DEGREES = Object.keys(INTERVALS) as Degree[];

const WORDS: Record<Degree, string> = {
  '1': 'root', '2': '2nd', b3: 'minor 3rd', '3': '3rd', '4': '4th', b5: 'flat 5th', '5': '5th', '#5': 'sharp 5th', '6': '6th',
  bb7: 'diminished 7th', b7: 'flat 7th', '7': 'major 7th', b9: 'flat 9th', '9': '9th', '#9': 'sharp 9th', '11': '11th', '#11': 'sharp 11th',
  b13: 'flat 13th', '13': '13th',
};

export const isDegree = (text: string): text is Degree => text in INTERVALS;

/** "flat 7th". */
export const degreeWords = (degree: Degree): string => WORDS[degree];
/** "♭7". */
export const printedDegree = (degree: Degree): string => degree.replaceAll('b', '♭').replaceAll('#', '♯');

/** Semitones above the root: 14 for a 9, 10 for a flat 7. */
export const semitonesOf = (degree: Degree): number => Interval.semitones(INTERVALS[degree]);
/** The same within one octave: 2 for a 9. */
export const stepOf = (degree: Degree): number => semitonesOf(degree) % 12;

/** Spelled once for each root: a few hundred names in all, asked for thousands of times when a path is sought. */
const spelled = new Map<NoteName, Map<Degree, NoteName>>();

/** The letter-true note of a degree: the flat 5 of Ab is Ebb, never D. Keeps an octave when the root has one. */
export function noteOfDegree(root: NoteName, degree: Degree): NoteName {
  const known = spelled.get(root)?.get(degree);
  if (known !== undefined) return known;
  const note = Note.transpose(root, INTERVALS[degree]);
  if (note === '') throw new Error(`${root} has no ${degree}`);
  const ofRoot = spelled.get(root) ?? new Map<Degree, NoteName>();
  spelled.set(root, ofRoot.set(degree, note));
  return note;
}

export type VoicedNote = { degree: Degree; note: NoteName; key: KeyNumber };

/**
 * A stack of degrees from the bottom up as exact notes: each degree goes to the nearest octave above the one
 * before it, the first to the nearest at or above the root. "1-11-b7-b3-5" on D3 is D3 G3 C4 F4 A4.
 */
export function stackOn(root: NoteName, degrees: readonly Degree[]): VoicedNote[] {
  const voiced: VoicedNote[] = [];
  let floor = keyOf(root) - 1;
  for (const degree of degrees) {
    const written = noteOfDegree(root, degree);
    const note = inOctave(written, Math.floor((floor - keyOf(written)) / 12) + 1);
    floor = keyOf(note);
    voiced.push({ degree, note, key: floor });
  }
  return voiced;
}

/** Reads "1-11-b7-b3-5". */
export const degreesOf = (stack: string): Degree[] => stack.split('-').map((text) => {
  if (!isDegree(text)) throw new Error(`${text} is not a degree`);
  return text;
});
