import { say, type Explained, type MoneyWords } from '../explained';
import { formatDate, plural } from '../format';
import { ratioOf } from '../money';
import { addDays, type LocalDate } from '../time';

export type Withdrawal = {
  receivedOn: LocalDate;
  noticeDays: number;
  /** The line as billed, after its discounts. */
  netMinor: number;
  lessonDates: readonly LocalDate[];
};
export type WithdrawalEffect = { lastChargeableOn: LocalDate; lastLessonOn: LocalDate | null; lessonsBack: number; creditMinor: number };

/**
 * House rule HR6: lessons inside the notice stay chargeable, the rest of the line goes back in proportion,
 * with its discounts, because they go back with the line (S13). Fees of other kinds stay.
 */
export function withdrawalCredit(withdrawal: Withdrawal, words: MoneyWords): Explained<WithdrawalEffect> {
  const lastChargeableOn = addDays(withdrawal.receivedOn, withdrawal.noticeDays);
  const kept = withdrawal.lessonDates.filter((date) => date <= lastChargeableOn);
  const all = withdrawal.lessonDates.length;
  const lessonsBack = all - kept.length;
  const creditMinor = all === 0 ? 0 : ratioOf(withdrawal.netMinor, lessonsBack, all);
  const day = formatDate(lastChargeableOn, words.locale);
  return {
    value: { lastChargeableOn, lastLessonOn: kept.at(-1) ?? null, lessonsBack, creditMinor },
    steps: [
      `Notice received ${formatDate(withdrawal.receivedOn, words.locale)}, ${plural(withdrawal.noticeDays, 'day')}: chargeable up to ${day}`,
      `${lessonsBack} of ${all} lessons go back: ${say(withdrawal.netMinor, words)} × ${lessonsBack} ÷ ${all} = ${say(creditMinor, words)}`,
    ],
  };
}
