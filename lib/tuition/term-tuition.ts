import { say, type Explained, type MoneyWords } from '../explained';
import { plural } from '../format';
import { ratioOf } from '../money';

export type LessonCharge = { lessons: number; unitMinor: number; lengthMinutes: number };

/** Per term by count: every planned lesson at the price of one. A Monday with fewer lessons costs less (S04). */
export function tuitionByCount({ lessons, unitMinor, lengthMinutes }: LessonCharge, words: MoneyWords): Explained<number> {
  const value = lessons * unitMinor;
  return { value, steps: [`${lessons} × ${lengthMinutes} min at ${say(unitMinor, words)} = ${say(value, words)}`] };
}

/** Monthly flat: the lessons of a whole year at the price of one, in equal months, rounded once (S04). */
export function monthlyFlatFee(charge: { lessonsInYear: number; unitMinor: number; months: number }, words: MoneyWords): Explained<number> {
  const { lessonsInYear, unitMinor, months } = charge;
  const value = ratioOf(unitMinor, lessonsInYear, months);
  return { value, steps: [`${lessonsInYear} lessons a year at ${say(unitMinor, words)}, in ${months} equal months = ${say(value, words)} a month`] };
}

/**
 * Leaving on a monthly flat fee: what was taught at the price of a lesson, against what was paid (S12).
 * Positive: the family owes it; negative: it goes back.
 */
export function settleMonthlyFlat(facts: { monthsPaid: number; feeMinor: number; lessonsUsed: number; unitMinor: number }, words: MoneyWords): Explained<number> {
  const paid = facts.monthsPaid * facts.feeMinor;
  const used = facts.lessonsUsed * facts.unitMinor;
  const value = used - paid;
  const outcome = value > 0 ? `${say(value, words)} is owed` : `${say(-value, words)} goes back`;
  return {
    value,
    steps: [
      `${plural(facts.monthsPaid, 'month')} paid at ${say(facts.feeMinor, words)} = ${say(paid, words)}`,
      `${plural(facts.lessonsUsed, 'lesson')} used at ${say(facts.unitMinor, words)} = ${say(used, words)}`,
      `${say(used, words)} − ${say(paid, words)}: ${outcome}`,
    ],
  };
}
