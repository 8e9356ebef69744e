import type { Degree } from '../../harmony/degree';
import type { AskedChord, Criteria, PlaySpec } from '../play-spec';

/** Keys in the order of the cycle of fourths. */
export const K12 = ['C', 'F', 'Bb', 'Eb', 'Ab', 'Db', 'Gb', 'B', 'E', 'A', 'D', 'G'];
export const K7 = ['C', 'F', 'Bb', 'Eb', 'A', 'D', 'G'];
export const K3 = ['C', 'F', 'G'];

/** Where the roots of the big stacks lie: the left hand stays clear of the mud below. */
export const STACK_ROOT = { lowest: 47, highest: 58 };
export const DOMINANT_ROOT = { lowest: 41, highest: 52 };
export const SHELL_ROOT = { lowest: 45, highest: 57 };
export const CADENCE_ROOT = { lowest: 41, highest: 57 };
/** Two octaves round middle C: narrow enough to stay in the middle, wide enough for each form in each of twelve keys. */
export const WIDE_WINDOW = { lowest: 48, highest: 72 };
export const LEAD_TOP = { lowest: 60, highest: 79 };

type Place = Pick<AskedChord, 'register' | 'rootRegister' | 'topRegister'>;
export const ask = (step: Degree, suffix: string, stacks: string | string[], place: Place = {}): AskedChord =>
  ({ step, suffix, stacks: [stacks].flat(), ...place });

/** Every chord asked by itself: one turn per stack. */
export const single = (suffix: string, stacks: string[], place: Place): AskedChord[][] => stacks.map((stack) => [ask('1', suffix, stack, place)]);

export const voicing = (turns: AskedChord[][]): PlaySpec => ({ how: 'voicing', turns });
export const within = (seconds: number, listenFor: string): Criteria => ({ seconds, slipsPerTurn: 0, isShuffled: false, listenFor });
export const inTime = (beatsPerMinute: number, beatsPerChord: number, listenFor: string): Criteria =>
  ({ tempo: { beatsPerMinute, beatsPerChord }, slipsPerTurn: 0, isShuffled: false, listenFor });
