import { say, type Explained, type MoneyWords } from '../explained';
import { formatDate, plural } from '../format';
import { ratioOf, splitByWeights } from '../money';
import { addDays, addMonths, daysBetween, type LocalDate } from '../time';

/** How a month that is joined part-way is charged. The setting in force on the start day decides. */
export type MonthRule = 'by_lessons' | 'by_days' | 'half_month';

/** A flat term fee for the lessons that are left: fee × remaining ÷ planned, rounded once (S10). */
export function prorateTerm(term: { feeMinor: number; planned: number; remaining: number }, words: MoneyWords): Explained<number> {
  const { feeMinor, planned, remaining } = term;
  if (planned <= 0 || remaining >= planned) return { value: planned <= 0 ? 0 : feeMinor, steps: [`Term fee for ${plural(planned, 'lesson')}: ${say(feeMinor, words)}`] };
  const value = ratioOf(feeMinor, remaining, planned);
  return { value, steps: [`${remaining} of ${planned} lessons left: ${say(feeMinor, words)} × ${remaining} ÷ ${planned} = ${say(value, words)}`] };
}

export type MonthStart = {
  feeMinor: number;
  startsOn: LocalDate;
  /** Every date of the month on which the lesson falls, from the first of the month on. */
  lessonDates: readonly LocalDate[];
  rule: MonthRule;
};

/** The first month of a monthly flat fee. A five-lesson month costs the same as a four-lesson one; only a part month is shared out (S11). */
export function prorateMonth(start: MonthStart, words: MoneyWords): Explained<number> {
  const first = `${start.startsOn.slice(0, 7)}-01`;
  if (start.startsOn === first) return { value: start.feeMinor, steps: [`Monthly fee: ${say(start.feeMinor, words)}`] };
  switch (start.rule) {
    case 'by_lessons': return byLessons(start, words);
    case 'by_days': return byDays(start, first, words);
    case 'half_month': return byHalves(start, words);
  }
}

function byLessons({ feeMinor, startsOn, lessonDates }: MonthStart, words: MoneyWords): Explained<number> {
  const left = lessonDates.filter((date) => date >= startsOn).length;
  const value = lessonDates.length === 0 ? 0 : ratioOf(feeMinor, left, lessonDates.length);
  return { value, steps: [`First month by lessons: ${left} of ${lessonDates.length}, ${say(feeMinor, words)} × ${left} ÷ ${lessonDates.length} = ${say(value, words)}`] };
}

function byDays({ feeMinor, startsOn }: MonthStart, first: LocalDate, words: MoneyWords): Explained<number> {
  const next = addMonths(first, 1);
  const [left, all] = [daysBetween(startsOn, next), daysBetween(first, next)];
  const value = ratioOf(feeMinor, left, all);
  return { value, steps: [`First month by days: ${left} of ${all}, ${say(feeMinor, words)} × ${left} ÷ ${all} = ${say(value, words)}`] };
}

function byHalves({ feeMinor, startsOn }: MonthStart, words: MoneyWords): Explained<number> {
  const isFirstHalf = startsOn <= addDays(`${startsOn.slice(0, 7)}-01`, 14);
  const value = isFirstHalf ? feeMinor : ratioOf(feeMinor, 1, 2);
  const when = formatDate(startsOn, words.locale);
  return { value, steps: [`Start on ${when}, ${isFirstHalf ? 'by the 15th: the full month' : 'after the 15th: half the month'} = ${say(value, words)}`] };
}

/** Shares an amount over two parts of a month by days. The parts add up to the whole: it is split, never rounded twice (B20). */
export const splitByDays = (amountMinor: number, days: readonly number[]): number[] => splitByWeights(amountMinor, days);
