import { say, sayPercent, type Explained, type MoneyWords } from '../explained';
import { percentOf, splitByWeights } from '../money';
import { addDays, addMonths, weekdayOf, type LocalDate } from '../time';

export type InstalmentPlan = {
  count: number;
  firstDueOn: LocalDate;
  /** Due with the first instalment, before the rest is cut; 0 for none. */
  depositBp: number;
  movesToWorkingDay: boolean;
};
export type Instalment = { instalmentNo: number; dueOn: LocalDate; amountMinor: number };

/** Saturday and Sunday move to Monday, and days on which the school is closed to the next open one. */
export function nextWorkingDay(date: LocalDate, closed: ReadonlySet<LocalDate> = new Set()): LocalDate {
  let day = date;
  while (weekdayOf(day) >= 6 || closed.has(day)) day = addDays(day, 1);
  return day;
}

/**
 * A share in equal instalments by largest remainder; due dates are counted from the anchor day, never chained,
 * so 31 Jan is followed by 28 Feb and 31 Mar (S15, B24, B25). The parts always add up to the share.
 */
export function instalmentsOf(amountMinor: number, plan: InstalmentPlan, words: MoneyWords): Explained<Instalment[]> {
  const amounts = amountsOf(amountMinor, plan);
  const value = amounts.map((amount, index) => {
    const due = addMonths(plan.firstDueOn, index);
    return { instalmentNo: index + 1, dueOn: plan.movesToWorkingDay ? nextWorkingDay(due) : due, amountMinor: amount };
  });
  const list = amounts.map((amount) => say(amount, words)).join(', ');
  const deposit = plan.depositBp > 0 ? `, the first a deposit of ${sayPercent(plan.depositBp)}` : '';
  return { value, steps: [value.length === 1 ? `${say(amountMinor, words)} at once` : `${say(amountMinor, words)} in ${amounts.length}${deposit}: ${list}`] };
}

function amountsOf(amountMinor: number, { count, depositBp }: InstalmentPlan): number[] {
  if (count <= 1) return [amountMinor];
  if (depositBp <= 0) return splitByWeights(amountMinor, Array<number>(count).fill(1));
  const deposit = percentOf(amountMinor, depositBp);
  return [deposit, ...splitByWeights(amountMinor - deposit, Array<number>(count - 1).fill(1))];
}
