import { chordName } from './chord-name';
import { chordOf, type Chord } from './chord';
import { stepOf } from './degree';
import { pitchClassOf, printedNote, type KeyNumber, type NoteName } from './note';
import { essentialDegrees, roleOf } from './tones';

/** One way to hear a set of keys, best first: "Fmaj7", or "Dm9 (no root)". */
export type ChordReading = { name: string; root: NoteName; suffix: string; hasRoot: boolean };

/** Kinds of chord the namer knows, richer ones first, so that a full stack is not named by its skeleton. */
const SUFFIXES = [
  '13b9', '13sus4', '7b9b13', '7#9b13', 'maj13', 'm11', '13', 'maj9#11', '9sus4', 'maj9', 'm9', '9', '6/9', 'm6/9', '7b9', '7#9', '7#11', '7b13',
  '7#5', '7b5', '7sus4', 'm(maj7)', 'maj7#11', 'maj7', 'm7', '7', 'm7b5', 'dim7', '6', 'm6', 'sus4', 'aug', 'dim', 'm', '',
] as const;
/** In the order of their half steps above C. */
const ROOTS: readonly NoteName[] = ['C', 'Db', 'D', 'Eb', 'E', 'F', 'F#', 'G', 'Ab', 'A', 'Bb', 'B'];

const PRINTED_ROOTS: readonly string[] = ROOTS.map(printedNote);
const FEWEST_KEYS = 3;

/** Twelve bits, one a half step above the root: a chord is compared with what sounds in two operations. */
type Mask = number;
type KnownKind = { suffix: string; printed: string; members: Mask; required: Mask; hasSeventh: boolean };

const ALL_STEPS = 0xfff;
const bitOf = (step: number): Mask => 1 << (((step % 12) + 12) % 12);
const maskOf = (steps: readonly number[]): Mask => steps.reduce((mask, step) => mask | bitOf(step), 0);
/** The same tones counted from another root. */
const from = (root: number, mask: Mask): Mask => ((mask >> root) | (mask << (12 - root))) & ALL_STEPS;

const KINDS: readonly KnownKind[] = SUFFIXES.map((suffix) => {
  const chord = chordOf(`C${suffix}`);
  const hasSeventh = essentialDegrees(chord).some((degree) => degree === 'b7' || degree === '7');
  return { suffix, printed: chordName({ root: '', bass: null, suffix }), members: maskOf(chord.degrees.map(stepOf)), required: maskOf(requiredSteps(chord)), hasSeventh };
});

const kindAbove = (mask: Mask): KnownKind | undefined => KINDS.find((kind) => (mask & ~kind.members) === 0 && (kind.required & ~mask) === 0);

/**
 * The chord of this root that has all the played keys and nothing else asked: guide tones and named colours must
 * sound, root and plain fifth may be missing. Null when no known kind fits.
 */
export function chordOver(root: NoteName, keys: readonly KeyNumber[]): Chord | null {
  const kind = kindAbove(from(pitchClassOf(root), maskOf(keys)));
  return kind ? chordOf(root + kind.suffix) : null;
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
  if (new Set(keys).size < FEWEST_KEYS) return [];
  const mask = maskOf(keys);
  const bass = Math.min(...keys) % 12;
  // The root in the bass, a root higher up, none at all.
  const [inBass, above, rootless]: ChordReading[][] = [[], [], []];
  ROOTS.forEach((root, at) => {
    const kind = kindAbove(from(at, mask));
    const hasRoot = (mask & bitOf(at)) !== 0;
    if (!kind || (!hasRoot && !kind.hasSeventh)) return;
    const name = PRINTED_ROOTS[at] + kind.printed;
    (at === bass ? inBass : hasRoot ? above : rootless)?.push({ name: hasRoot ? name : `${name} (no root)`, root, suffix: kind.suffix, hasRoot });
  });
  return [...(inBass ?? []), ...(above ?? []), ...(rootless ?? [])];
}
