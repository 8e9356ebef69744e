import { chordName, type ChordStyle } from './chord-name';
import { toneOf } from './findings';
import { printedDegree, type Degree } from './degree';
import { printedNote, type KeyNumber } from './note';
import { targetName, type Target } from './target';
import { leadingBetween, type VoiceMove } from './voice-leading';

/** A chord as it was voiced: what was asked, and the keys that sound. */
export type Sounding = { target: Target; keys: readonly KeyNumber[] };

const SIZES = ['', 'a half step', 'a whole step'];
const sizeWords = (semitones: number): string => SIZES[Math.abs(semitones)] ?? `${Math.abs(semitones)} half steps`;

/** "C falls a half step to B: ♭7 becomes 3." Names come from what was asked, never from the key. */
export function moveWords(from: Target, to: Target, { from: start, to: goal, semitones }: VoiceMove): string {
  const [before, after] = [toneOf(from, start), toneOf(to, goal)];
  const becomes = `${printedDegree(before.degree)} becomes ${printedDegree(after.degree)}`;
  if (semitones === 0) return `${printedNote(before.note)} stays: ${becomes}.`;
  return `${printedNote(before.note)} ${semitones < 0 ? 'falls' : 'rises'} ${sizeWords(semitones)} to ${printedNote(after.note)}: ${becomes}.`;
}

/** Every voice of a change in words, from the bottom up. */
export const changeWords = (from: Sounding, to: Sounding): string[] =>
  leadingBetween(from.keys, to.keys).moves.map((move) => moveWords(from.target, to.target, move));

export type GuideResolution = { isResolved: boolean; words: string };

const SEVENTHS: readonly Degree[] = ['7', 'b7', 'bb7'];
const WIDEST_STEP = 2;

/**
 * Where the seventh of a chord goes at the change: it falls by a step or stays (Music Theory for the 21st-Century
 * Classroom, "Voice Leading Seventh Chords"; Open Music Theory). Null when no seventh sounds.
 */
export function seventhResolution(from: Sounding, to: Sounding, style: ChordStyle = 'words'): GuideResolution | null {
  const seventh = from.target.chord.degrees.find((degree) => SEVENTHS.includes(degree));
  if (!seventh) return null;
  const move = leadingBetween(from.keys, to.keys).moves.find(({ from: key }) => toneOf(from.target, key).degree === seventh);
  if (!move) return null;
  const isResolved = move.semitones <= 0 && move.semitones >= -WIDEST_STEP;
  const name = `The 7th of ${chordName(from.target.chord, style)}`;
  if (isResolved) return { isResolved, words: `${name} resolves. ${moveWords(from.target, to.target, move)}` };
  return { isResolved, words: `${name}, ${printedNote(toneOf(from.target, move.from).note)}, should fall a step into ${targetName(to.target, style)}, or stay.` };
}
