import { Note } from 'tonal';

/** A letter with its accidentals and, where it matters, an octave: "Bb", "Ebb4", "F##3". C4 is middle C. */
export type NoteName = string;
/** A key of the keyboard by its MIDI number: 60 is C4, middle C; 21 to 108 are the 88 keys of a piano. */
export type KeyNumber = number;

export const LOWEST_KEY: KeyNumber = 21;
export const HIGHEST_KEY: KeyNumber = 108;
const LOWEST_MIDI = 0;
const HIGHEST_MIDI = 127;

export const isKeyNumber = (key: number): boolean => Number.isInteger(key) && key >= LOWEST_MIDI && key <= HIGHEST_MIDI;

/**
 * The key a spelled note is played on. The octave number follows the letter, so Cb4 is the key below C4 and
 * B#3 is the same key as C4 (Open Music Theory, "Pitches and octave designations").
 */
export function keyOf(note: NoteName): KeyNumber {
  const { midi } = Note.get(note);
  if (midi === null || midi === undefined) throw new Error(`${note} is not a key of the keyboard`);
  return midi;
}

/** 0 for C to 11 for B, whatever the spelling: C# and Db are one. */
export const pitchClassOf = (note: NoteName): number => {
  const { chroma, empty } = Note.get(note);
  if (empty) throw new Error(`${note} is not a note`);
  return chroma;
};

/** Hertz in equal temperament with A4 = 440 Hz (ISO 16): f = 440 · 2^((key − 69) / 12). */
export const frequencyOf = (key: KeyNumber): number => 440 * 2 ** ((key - 69) / 12);

/** The same note so many octaves higher (or, negative, lower); the letter stays. */
export function inOctave(note: NoteName, octavesUp: number): NoteName {
  const { pc, oct } = Note.get(note);
  return `${pc}${(oct ?? 0) + octavesUp}`;
}

/** As it is printed: "E♭♭" for "Ebb", "F♯" for "F#". Single signs repeated, because many fonts lack the double ones. */
export const printedNote = (note: NoteName): string => note.replace(/^([A-G])(b+|#+)?/, (_all, letter: string, signs: string | undefined) =>
  letter + (signs ?? '').replaceAll('b', '♭').replaceAll('#', '♯'));

/** For a screen reader: "E flat", "F double sharp". */
export function spokenNote(note: NoteName): string {
  const [, letter = '', signs = ''] = /^([A-G])(b*|#*)/.exec(note) ?? [];
  const many = ['', '', 'double ', 'triple '][signs.length] ?? '';
  return signs === '' ? letter : `${letter} ${many}${signs.startsWith('b') ? 'flat' : 'sharp'}`;
}

const PLAIN_NAMES = ['C', 'C♯', 'D', 'E♭', 'E', 'F', 'F♯', 'G', 'A♭', 'A', 'B♭', 'B'] as const;

/** A name for a key when no chord says how to spell it, such as "C4" on the keyboard itself. */
export const plainKeyName = (key: KeyNumber): string => `${PLAIN_NAMES[((key % 12) + 12) % 12] ?? ''}${Math.floor(key / 12) - 1}`;

export const isBlackKey = (key: KeyNumber): boolean => [1, 3, 6, 8, 10].includes(key % 12);
