import { chordName, type ChordStyle } from './chord-name';
import { chordOf, type Chord } from './chord';
import { degreesOf, noteOfDegree, stackOn, type Degree, type VoicedNote } from './degree';
import { HIGHEST_KEY, keyOf, LOWEST_KEY, type KeyNumber, type NoteName } from './note';

/** Where a voicing may lie: the lowest and highest key allowed, both included. */
export type Register = { lowest: KeyNumber; highest: KeyNumber };

/** What is asked: a chord, and for an exact voicing its notes from the bottom up. */
export type Target = { chord: Chord; notes: VoicedNote[] };

const WHOLE_KEYBOARD: Register = { lowest: LOWEST_KEY, highest: HIGHEST_KEY };
/** A stack spans less than three octaves, so one whose root stands higher leaves the keyboard anyway. */
const HIGHEST_ROOT_OCTAVE = 6;

export type Place = {
  /** Every key must lie inside. */
  register?: Register;
  /** The root, played or only thought, must lie inside: for voicings that stand on it. */
  rootRegister?: Register;
  /** The top key must lie inside: for voicings that are led by their top. */
  topRegister?: Register;
};

/** Every place of a stack on the keyboard that its registers allow, from the lowest up. */
export function placementsOf(root: NoteName, stack: readonly Degree[], { register, rootRegister, topRegister }: Place): VoicedNote[][] {
  const found: VoicedNote[][] = [];
  for (let octave = 0; octave <= HIGHEST_ROOT_OCTAVE; octave += 1) {
    const notes = stackOn(`${root}${octave}`, stack);
    const fits = isInside(notes.map(({ key }) => key), register ?? WHOLE_KEYBOARD)
      && isInside([keyOf(`${root}${octave}`)], rootRegister ?? WHOLE_KEYBOARD)
      && isInside([notes.at(-1)?.key ?? 0], topRegister ?? WHOLE_KEYBOARD);
    if (fits) found.push(notes);
  }
  return found;
}

const isInside = (keys: readonly KeyNumber[], { lowest, highest }: Register): boolean => keys.every((key) => key >= lowest && key <= highest);

export type Asked = Place & { symbol: string; stack?: string };

/**
 * A chord to be played: with a stack in its lowest place, without one in any voicing.
 *
 * @throws when the stack cannot lie in the register: the product's own data is then wrong, not the player.
 */
export function targetOf({ symbol, stack, ...place }: Asked): Target {
  const chord = chordOf(symbol);
  const notes = stack === undefined ? [] : placementsOf(chord.root, degreesOf(stack), place)[0];
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
