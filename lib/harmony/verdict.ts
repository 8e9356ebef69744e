import type { Degree } from './degree';
import type { KeyNumber, NoteName } from './note';

/**
 * What was heard against what was asked, the gravest finding first in the order below. `register`: right shape,
 * other octave. `spread`: right notes and bass, other spacing. `sus`: a fourth stands where a dominant has its
 * third. `clean`: a free voicing without a fault.
 */
export type VerdictKind =
  | 'not_a_key' | 'nothing_played' | 'exact' | 'clean' | 'register' | 'inversion' | 'spread' | 'sus' | 'avoid' | 'foreign' | 'missing' | 'doubled';

export type HeardTone = { key: KeyNumber; degree: Degree; note: NoteName };

export type Verdict = {
  kind: VerdictKind;
  /** Every guide tone and altered fifth there, nothing foreign, nothing to avoid. */
  isClean: boolean;
  /** What the rung asks for, key by key (or, for a free voicing, without a fault). */
  isRight: boolean;
  missing: Degree[];
  missingEssential: Degree[];
  foreign: HeardTone[];
  avoid: HeardTone[];
  doubled: HeardTone[];
  octavesOff: number;
  /** The name of what was played over the same root, when it is another chord: "C9" for Cmaj9 with a flat 7. */
  soundsAs: string | null;
  headline: string;
  /** Sentences a student can act on. */
  details: string[];
};

/** Stored with every proof, so that an old verdict says by which rules it was reached. */
export const JUDGE_VERSION = 1;

export const emptyVerdict = (kind: VerdictKind, headline: string, details: string[] = []): Verdict => ({
  kind, isClean: false, isRight: false, missing: [], missingEssential: [], foreign: [], avoid: [], doubled: [], octavesOff: 0, soundsAs: null, headline, details,
});

/** The first words on the verdict, beside its sign. */
export const HEADLINES: Record<VerdictKind, string> = {
  not_a_key: 'Not a key of the keyboard.', nothing_played: 'Nothing played.', exact: 'Right notes, right order.', clean: 'Clean.',
  register: 'Right shape, other octave.', inversion: 'Right notes, other bass.', spread: 'Right notes, other spacing.', sus: 'A suspended chord.',
  avoid: 'One note to avoid.', foreign: 'Not this chord yet.', missing: 'Not all there yet.', doubled: 'All there, and more.',
};
