import * as z from 'zod';
import { DEGREES } from '../harmony/degree';

/**
 * What a rung asks to be played, as data. A turn is what is asked at once: one chord, or several that follow one
 * another such as a two-five-one. The root of each chord is a degree above the drawn key. Several stacks on one
 * chord mean that any of them counts.
 */
const registerSchema = z.object({ lowest: z.number().int(), highest: z.number().int() });

const askedChordSchema = z.object({
  step: z.enum(DEGREES),
  suffix: z.string(),
  stacks: z.array(z.string()),
  /** Where every key must lie. */
  register: registerSchema.optional(),
  /** Where the root must lie, for voicings that stand on it. */
  rootRegister: registerSchema.optional(),
  /** Where the top key must lie, for voicings led by their top. */
  topRegister: registerSchema.optional(),
});

export const playSpecSchema = z.object({
  /** `voicing`: these keys exactly. `free`: any voicing of the chord without a fault. The spoken ones are told, not played. */
  how: z.enum(['voicing', 'free', 'spell', 'name_tensions']),
  turns: z.array(z.array(askedChordSchema).min(1)).min(1),
});

export const criteriaSchema = z.object({
  /** Seconds from the question to the last key down. */
  seconds: z.number().positive().optional(),
  tempo: z.object({ beatsPerMinute: z.number().int().positive(), beatsPerChord: z.number().int().positive() }).optional(),
  /** Chords of a turn that may go wrong and it still counts. */
  slipsPerTurn: z.number().int().min(0),
  isShuffled: z.boolean(),
  /** What no machine hears: the teacher listens for it. */
  listenFor: z.string(),
});

export type AskedChord = z.output<typeof askedChordSchema>;
export type PlaySpec = z.output<typeof playSpecSchema>;
export type Criteria = z.output<typeof criteriaSchema>;
export type HowHeard = PlaySpec['how'];

export const isSpoken = (how: HowHeard): boolean => how === 'spell' || how === 'name_tensions';

/** "12 of 12 keys", "24 of 25": how many of the drawn ones must be heard. */
export type RungText = {
  code: string;
  title: string;
  /** For guardians and students: a short name, what one can do with it, and what it sounds like. */
  plainTitle: string;
  canDo: string;
  soundsLike: string;
  spec: PlaySpec;
  criteria: Criteria;
  keyPool: string[];
  keysDrawn: number;
  keysNeeded: number;
};
export type RungSeed = RungText & { must: string[]; should?: string[] };
export type LevelSeed = { no: number; title: string; shortTitle: string; plainTitle: string; rungs: RungSeed[] };
