import { chordName } from './chord-name';
import { chordOf, type Chord } from './chord';
import { stepOf } from './degree';
import { pitchClassOf, type KeyNumber, type NoteName } from './note';
import { essentialDegrees, roleOf } from './tones';

/** One way to hear a set of keys, best first: "Fmaj7", or "Dm9 (no root)". */
export type ChordReading = { name: string; root: NoteName; suffix: string; hasRoot: boolean };

/** Kinds of chord the namer knows, richer ones first, so that a full stack is not named by its skeleton. */
const SUFFIXES = [
  '13b9', '13sus4', '7b9b13', '7#9b13', 'maj13', 'm11', '13', 'maj9#11', '9sus4', 'maj9', 'm9', '9', '6/9', 'm6/9', '7b9', '7#9', '7#11', '7b13',
  '7#5', '7b5', '7sus4', 'm(maj7)', 'maj7#11', 'maj7', 'm7', '7', 'm7b5', 'dim7', '6', 'm6', 'sus4', 'aug', 'dim', 'm', '',
] as const;
const ROOTS: readonly NoteName[] = ['C', 'Db', 'D', 'Eb', 'E', 'F', 'F#', 'G', 'Ab', 'A', 'Bb', 'B'];

/**
 * The chord of this root that has all the played keys and nothing else asked: guide tones and named colours must
 * sound, root and plain fifth may be missing. Null when no known kind fits.
 */
export function chordOver(root: NoteName, keys: readonly KeyNumber[]): Chord | null {
  const base = pitchClassOf(root);
  const steps = new Set(keys.map((key) => (key - base + 1200) % 12));
  for (const suffix of SUFFIXES) {
    const chord = chordOf(root + suffix);
    const members = new Map(chord.degrees.map((degree) => [stepOf(degree), degree]));
    const isInside = [...steps].every((step) => members.has(step));
    if (isInside && requiredSteps(chord).every((step) => steps.has(step))) return chord;
  }
  return null;
}

/** A colour below the one that gives the chord its name may be missing: a 13 without its 9 is still a 13. */
function requiredSteps(chord: Chord): number[] {
  const colours = chord.degrees.filter((degree) => roleOf(degree) === 'colour');
  const isTopOnly = /^(maj|m)?13|^m11/.test(chord.suffix);
  const named = isTopOnly ? colours.slice(-1) : colours;
  const fifth = essentialDegrees(chord).length < 2 ? chord.degrees.filter((degree) => degree === '5') : [];
  return [...essentialDegrees(chord), ...named, ...fifth].map(stepOf);
}

/**
 * Names for keys when no target was asked. The same four keys are Fmaj7 and Dm9 without its root: both are
 * offered, the one whose root is in the bass first. A guess for the screen; the judge never uses it.
 */
export function readingsOf(keys: readonly KeyNumber[]): ChordReading[] {
  const sorted = [...new Set(keys)].sort((a, b) => a - b);
  const bass = sorted[0];
  if (bass === undefined || sorted.length < 3) return [];
  const steps = new Set(sorted.map((key) => key % 12));
  const found = ROOTS.flatMap((root) => {
    const chord = chordOver(root, sorted);
    const hasRoot = steps.has(pitchClassOf(root));
    if (!chord || (!hasRoot && !essentialDegrees(chord).some((degree) => degree === 'b7' || degree === '7'))) return [];
    const rank = pitchClassOf(root) === bass % 12 ? 0 : hasRoot ? 1 : 2;
    return [{ rank, reading: { name: hasRoot ? chordName(chord) : `${chordName(chord)} (no root)`, root, suffix: chord.suffix, hasRoot } }];
  });
  return found.sort((a, b) => a.rank - b.rank).map(({ reading }) => reading);
}
