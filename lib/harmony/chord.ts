import { noteOfDegree, type Degree } from './degree';
import { printedNote, type NoteName } from './note';
import { degreesOfParts, suffixOfParts } from './quality';
import { readQuality } from './quality-grammar';
import { plainSigns } from './symbol-signs';

export type Chord = {
  root: NoteName;
  /** The bass after a slash; null when the root (or nobody) has the bass. */
  bass: NoteName | null;
  /** One plain spelling per chord: "m7b5", "7b9b13", "maj9". */
  suffix: string;
  degrees: Degree[];
  isAlt: boolean;
};

/** What a chord symbol means, or one sentence on why it means nothing. "N.C." is an answer, not an error. */
export type SymbolReading = { kind: 'chord'; chord: Chord } | { kind: 'no_chord' } | { kind: 'refused'; message: string };

export const LONGEST_SYMBOL = 32;
const refused = (message: string): SymbolReading => ({ kind: 'refused', message });
const ROOT = /^([A-G])(bb|b|##|#|x)?/;
const BASS = /\/ *([A-Ga-gHh])(bb|b|##|#|x)?$/;

/**
 * Reads a chord symbol in every spelling the school accepts. The accidental always belongs to the root: "Cb9" is
 * the ninth chord on C flat, "C(b9)" a triad with a flat 9, "C7(b9)" the usual one (Music Theory for the
 * 21st-Century Classroom gives this triple).
 */
export function readSymbol(typed: string): SymbolReading {
  const text = plainSigns(typed);
  if (text === '') return refused('Type a chord, for example Dm7 or G13.');
  if (text.length > LONGEST_SYMBOL) return refused(`A chord symbol has at most ${LONGEST_SYMBOL} signs.`);
  if (/^n\.? ?c\.?$/i.test(text)) return { kind: 'no_chord' };
  const root = ROOT.exec(text);
  if (!root) return refused(rootProblem(text));
  return readAfterRoot(text.slice(root[0].length), letterOf(root));
}

const letterOf = (found: RegExpExecArray): NoteName => (found[1] ?? '') + (found[2] ?? '').replace('x', '##');

function rootProblem(text: string): string {
  const first = Array.from(text)[0] ?? '';
  if (/^[a-g]/.test(text)) return `Write the root as a capital letter: ${first.toUpperCase()}${text.slice(1)}.`;
  if (/^[Hh]/.test(text)) return 'H is the German name of B. Write B, or Bb for the German B.';
  return `A chord begins with a letter from A to G; “${first}” is none.`;
}

function readAfterRoot(after: string, root: NoteName): SymbolReading {
  const slash = BASS.exec(after);
  const body = slash ? after.slice(0, slash.index) : after;
  if (slash && !/[A-G]/.test(slash[1] ?? '')) return refused(`The bass “${slash[1]}” is a capital letter from A to G.`);
  const problem = bodyProblem(body, root);
  if (problem) return refused(problem);
  const opened = body.replace(/[()]/g, ' ').replace(/ +/g, ' ').trimEnd();
  const { rest, parts } = readQuality(opened);
  if (rest !== '') return refused(`“${rest}” was not understood after ${printedNote(root)}${opened.slice(0, -rest.length).trim()}.`);
  const bass = slash && letterOf(slash) !== root ? letterOf(slash) : null;
  return { kind: 'chord', chord: { root, bass, suffix: suffixOfParts(parts), degrees: degreesOfParts(parts), isAlt: parts.isAlt } };
}

function bodyProblem(body: string, root: NoteName): string | null {
  let depth = 0;
  for (const sign of body) {
    if (sign === '(') depth += 1;
    if (sign === ')') depth -= 1;
    if (depth < 0 || depth > 1) return 'The brackets do not match.';
  }
  if (depth !== 0) return 'A bracket is open and not closed.';
  const plus = /^\+(9|11|13)/.exec(body);
  if (plus) return `${root}+${plus[1]} can be read two ways. Write ${root}${plus[1]}(#5) or ${root}7(#${plus[1]}).`;
  if (/\/(?!9)/.test(body)) return 'After the slash stands the bass note, for example C/E.';
  return null;
}

/** For the product's own data, whose symbols are known to be right: a wrong one is a fault, not a typing error. */
export function chordOf(symbol: string): Chord {
  const reading = readSymbol(symbol);
  if (reading.kind !== 'chord') throw new Error(`${symbol} is not a chord`);
  return reading.chord;
}

/** The spelled members without octaves, from the root up: Ab Cb Ebb Gb for Abm7b5. */
export const spelledMembers = (chord: Chord): NoteName[] => chord.degrees.map((degree) => noteOfDegree(chord.root, degree));
