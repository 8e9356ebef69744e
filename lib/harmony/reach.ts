/** From a fourth, a very small child’s hand, to a twelfth, wider than nearly any. */
export const LEAST_REACH = 5;
export const MOST_REACH = 19;

const INTERVALS: Record<number, string> = {
  5: 'a fourth', 6: 'a tritone', 7: 'a fifth', 8: 'a minor sixth', 9: 'a major sixth', 10: 'a minor seventh', 11: 'a major seventh', 12: 'an octave',
  13: 'a minor ninth, an octave and a semitone', 14: 'a ninth, an octave and a whole tone', 15: 'a minor tenth, an octave and a minor third',
  16: 'a tenth, an octave and a major third', 17: 'an eleventh, an octave and a fourth', 18: 'a wide eleventh, an octave and a tritone',
  19: 'a twelfth, an octave and a fifth',
};

/** "a ninth, an octave and a whole tone (14 semitones)": the reach of a hand as the interval it spans. */
export const reachWords = (semitones: number): string => `${INTERVALS[semitones] ?? 'a span'} (${semitones} semitones)`;

/**
 * Common practice, which the school follows: the hand is measured relaxed, thumb and little finger lying on the near
 * edge of the white keys, nothing pressed and nothing stretched. Chords written for one hand stay within an octave;
 * many grown hands lie on a ninth, few on a tenth, children’s on less than an octave. A wider chord is shared between the
 * hands, thinned or rolled, and rolled counts as played. General information, not medical advice.
 */
export const HOW_REACH_IS_MEASURED = 'Measure it relaxed: thumb and little finger lie on the near edge of the white keys, nothing pressed. Stretching should never hurt; if it does, the number is too high.';
