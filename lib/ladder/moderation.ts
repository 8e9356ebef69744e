/**
 * One standard for all teachers: second markers hear stored proofs without knowing name, first mark or assessor. What
 * comes out is a talk about the wording of a rung, never a league table of teachers.
 */
export type TwoMarks = { first: 'passed' | 'not_yet'; second: 'passed' | 'not_yet' };

export type Agreement = {
  count: number;
  /** Share of marks that agree. */
  observed: number;
  /** Share that would agree by chance, given how often each marker passes. */
  byChance: number;
  /** Cohen's kappa; null when chance alone would agree always. */
  kappa: number | null;
  /** A 95 % range of kappa, from its large-sample standard error: wide with few marks. */
  range: { from: number; to: number } | null;
};

/** Below this the school meets about its standard. Common practice, no source: the school may set its own. */
export const AGREEMENT_AIM = 0.6;
const Z_95 = 1.96;

/** Agreement of two markers (Cohen, 1960: kappa = (observed − chance) / (1 − chance)). */
export function agreementOf(marks: readonly TwoMarks[]): Agreement | null {
  const count = marks.length;
  if (count === 0) return null;
  const share = (is: (mark: TwoMarks) => boolean) => marks.filter(is).length / count;
  const [first, second] = [share((mark) => mark.first === 'passed'), share((mark) => mark.second === 'passed')];
  const observed = share((mark) => mark.first === mark.second);
  const byChance = first * second + (1 - first) * (1 - second);
  if (byChance >= 1) return { count, observed, byChance, kappa: null, range: null };
  const kappa = (observed - byChance) / (1 - byChance);
  const error = Math.sqrt((observed * (1 - observed)) / count) / (1 - byChance);
  return { count, observed, byChance, kappa, range: { from: Math.max(-1, kappa - Z_95 * error), to: Math.min(1, kappa + Z_95 * error) } };
}

/** Whether the school should meet about its standard. No opinion with no marks. */
export const needsMeeting = (agreement: Agreement | null): boolean => agreement?.kappa !== null && agreement !== null && agreement.kappa < AGREEMENT_AIM;

/**
 * The chance of at least so many passes if this teacher's students were as the school's: the upper tail of the
 * binomial. Small means: invite to hear some proofs again. The mix of students is a possible reason, and is named.
 *
 * @param passShare the school's own share of passes, 0 to 1
 */
export function chanceOfAtLeast(passes: number, hearings: number, passShare: number): number {
  let chance = 0;
  for (let count = passes; count <= hearings; count += 1) chance += binomial(hearings, count) * passShare ** count * (1 - passShare) ** (hearings - count);
  return Math.min(1, chance);
}

function binomial(of: number, take: number): number {
  let ways = 1;
  for (let at = 1; at <= take; at += 1) ways = (ways * (of - take + at)) / at;
  return ways;
}

/** Rarer than one in a hundred: a private invitation. */
export const DRIFT_CHANCE = 0.01;
export const REMARKED_PROOFS = 6;

/** In either direction: passing nearly all, or nearly none. Too few hearings say nothing. */
export function isDrifting(passes: number, hearings: number, passShare: number): boolean {
  if (hearings < REMARKED_PROOFS) return false;
  return chanceOfAtLeast(passes, hearings, passShare) < DRIFT_CHANCE || chanceOfAtLeast(hearings - passes, hearings, 1 - passShare) < DRIFT_CHANCE;
}
