import { chordOf } from '../harmony/chord';
import { noteOfDegree } from '../harmony/degree';
import { pitchClassOf, printedNote, type NoteName } from '../harmony/note';
import type { AskedChord, PlaySpec } from './play-spec';

const EASY_ROOTS: readonly NoteName[] = ['C', 'Db', 'D', 'Eb', 'E', 'F', 'Gb', 'G', 'Ab', 'A', 'Bb', 'B'];
/** Roots that players avoid: C♭, F♭, E♯, B♯ and every double accidental. */
const HARD_ROOT = /^(Cb|Fb|E#|B#|[A-G](bb|##).*)$/;

/** The substitute of G♭ is written G7, never A♭♭7: the school asks for chords as players write them. */
const playersRoot = (note: NoteName): NoteName => (HARD_ROOT.test(note) ? (EASY_ROOTS[pitchClassOf(note)] ?? note) : note);

/** Minor chords and keys are asked on C♯ and F♯, which have far fewer flats than D♭ and G♭ minor. */
const MINOR_ROOTS: Record<string, NoteName> = { Db: 'C#', Gb: 'F#' };
const isMinor = (suffix: string): boolean => chordOf(`C${suffix}`).degrees.includes('b3');

/** The key of a turn as it is written: minor when its tonic chord is minor. */
export function writtenKey(key: NoteName, turn: readonly AskedChord[]): NoteName {
  const tonic = turn.find(({ step }) => step === '1');
  return tonic && isMinor(tonic.suffix) && turn.at(-1)?.step === '1' ? (MINOR_ROOTS[key] ?? key) : key;
}

export const chordRoot = (key: NoteName, { step }: AskedChord): NoteName => playersRoot(noteOfDegree(key, step));

/** What the grid of keys shows: "Dm" when the rung asks one kind of chord, "D" for a sequence, else the chord. */
export function keyLabel({ turns }: PlaySpec, key: NoteName, turn: readonly AskedChord[]): { isWholeChord: boolean; text: string } {
  const written = writtenKey(key, turn);
  const [first] = turn;
  if (turn.length > 1 || !first) return { isWholeChord: false, text: printedNote(written) + (turn.at(-1)?.step === '1' && isMinor(turn.at(-1)?.suffix ?? '') ? 'm' : '') };
  const kinds = new Set(turns.map((other) => other[0]?.step + (other[0]?.suffix ?? '')));
  if (kinds.size > 1) return { isWholeChord: true, text: chordRoot(written, first) + first.suffix };
  return { isWholeChord: false, text: printedNote(chordRoot(written, first)) + (isMinor(first.suffix) ? 'm' : '') };
}
