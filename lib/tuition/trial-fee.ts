import { say, type Explained, type MoneyWords } from '../explained';
import { formatDate } from '../format';
import type { LocalDate } from '../time';

/** The trial fee comes off the first bill when the family enrols up to and including the last day (S01). Zero or negative. */
export function trialFeeCredit(trial: { feeMinor: number; creditUntilOn: LocalDate }, enrolledOn: LocalDate, words: MoneyWords): Explained<number> {
  const until = formatDate(trial.creditUntilOn, words.locale);
  const enrolled = formatDate(enrolledOn, words.locale);
  if (enrolledOn > trial.creditUntilOn) return { value: 0, steps: [`Enrolled on ${enrolled}, after ${until}: the trial fee stays`] };
  return { value: -trial.feeMinor || 0, steps: [`Enrolled on ${enrolled}, by ${until}: the trial fee of ${say(trial.feeMinor, words)} comes off`] };
}
