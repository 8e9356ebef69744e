/** A mark from 0 to 4 by one criterion. The weights of a scheme add up to 100. */
export type Mark = { criterion: string; weightPercent: number; score: number };

export type ScoreRule = { passHundredths: number; lowestScore: number };
/** Passed from 3.00 on, and no criterion below 2. */
const USUAL_SCORE_RULE: ScoreRule = { passHundredths: 300, lowestScore: 2 };

export type WeightedScore = { totalHundredths: number; isPassed: boolean; steps: string[] };

const hundredths = (value: number): string => (value / 100).toFixed(2);

/**
 * The weighted score in hundredths, an exact integer: weights 50, 30 and 20 with 4, 3 and 2 make 3.30.
 *
 * @throws when a mark is no whole number from 0 to 4 or the weights do not add up to 100
 */
export function weightedScore(marks: readonly Mark[], rule: ScoreRule = USUAL_SCORE_RULE): WeightedScore {
  if (marks.some(({ score }) => !Number.isInteger(score) || score < 0 || score > 4)) throw new Error('a mark is a whole number from 0 to 4');
  if (marks.reduce((sum, { weightPercent }) => sum + weightPercent, 0) !== 100) throw new Error('the weights of the criteria add up to 100');
  const totalHundredths = marks.reduce((sum, { weightPercent, score }) => sum + weightPercent * score, 0);
  const low = marks.filter(({ score }) => score < rule.lowestScore);
  const isPassed = totalHundredths >= rule.passHundredths && low.length === 0;
  return { totalHundredths, isPassed, steps: [
    `${marks.map(({ criterion, weightPercent, score }) => `${criterion} ${score} × ${weightPercent} %`).join(' + ')} = ${hundredths(totalHundredths)}`,
    ...low.map(({ criterion, score }) => `${criterion} has ${score}; every criterion needs at least ${rule.lowestScore}.`),
    isPassed ? `Passed: at least ${hundredths(rule.passHundredths)}.` : `Not yet: it takes ${hundredths(rule.passHundredths)} and no criterion below ${rule.lowestScore}.`,
  ] };
}
