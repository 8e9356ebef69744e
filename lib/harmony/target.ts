import { chordName, type ChordStyle } from './chord-name';
import { chordOf, type Chord } from './chord';
import { degreesOf, noteOfDegree, stackOn, type Degree, type VoicedNote } from './degree';
import { HIGHEST_KEY, keyOf, LOWEST_KEY, type KeyNumber, type NoteName } from './note';

/** Where a voicing may lie: the lowest and highest key allowed, both included. */
export type Register = { lowest: KeyNumber; highest: KeyNumber };

/** What is asked: a chord, and for an exact voicing its notes from the bottom up. */
export type Target = { chord: Chord; notes: VoicedNote[] };

const WHOLE_KEYBOARD: Register = { lowest: LOWEST_KEY, highest: HIGHEST_KEY };

/**
 * The lowest place of a stack in a register. `rootRegister` says where the root itself (played or only thought)
 * may lie, for rungs that fix the bass; otherwise every key of the voicing must lie inside.
 */
export function placeStack(root: NoteName, stack: readonly Degree[], place: { register?: Register; rootRegister?: Register }): VoicedNote[] | null {
  const register = place.register ?? WHOLE_KEYBOARD;
  for (let octave = 0; octave <= 7; octave += 1) {
    const low = `${root}${octave}`;
    if (place.rootRegister && !isInside([keyOf(low)], place.rootRegister)) continue;
    const notes = stackOn(low, stack);
    if (isInside(notes.map((note) => note.key), register)) return notes;
  }
  return null;
}

const isInside = (keys: readonly KeyNumber[], { lowest, highest }: Register): boolean => keys.every((key) => key >= lowest && key <= highest);

export type Asked = { symbol: string; stack?: string; register?: Register; rootRegister?: Register };

/** @throws when the stack cannot lie in the register: the product's own data is then wrong, not the player. */
export function targetOf({ symbol, stack, register, rootRegister }: Asked): Target {
  const chord = chordOf(symbol);
  const notes = stack === undefined ? [] : placeStack(chord.root, degreesOf(stack), { register, rootRegister });
  if (!notes) throw new Error(`${symbol} as ${stack} does not fit its register`);
  return { chord, notes };
}

/** "Dm9 (no root)" for a voicing that leaves the root to the bass player. */
export function targetName({ chord, notes }: Target, style: ChordStyle = 'words'): string {
  const isRootless = notes.length > 0 && !notes.some(({ degree }) => degree === '1');
  return chordName(chord, style) + (isRootless ? ' (no root)' : '');
}

/** The degrees the target asks for: its stack, or every member of the chord when the voicing is free. */
export const askedDegrees = ({ chord, notes }: Target): Degree[] => (notes.length > 0 ? notes.map(({ degree }) => degree) : chord.degrees);

/** How a degree is spelled here, without octave: names always come from what was asked. */
export const spellingOf = ({ chord }: Target, degree: Degree): NoteName => noteOfDegree(chord.root, degree);
