import { BASIS_POINTS } from '../money';
import { ATTENDANCE_WORDS, MARKS } from './attendance';
import type { Consequence, Consequences } from './consequences';

export const CREDIT_WORDS: Record<Consequence['credit'], string> = { none: 'no make-up credit', capped: 'make-up credit within the cap', free: 'make-up credit outside the cap' };

/** "50 %", "62.5 %". */
export const shareWords = (bp: number): string => `${(bp * 100) / BASIS_POINTS} %`;
export const payWords = ({ payBp: { employee, contractor } }: Consequence): string =>
  (employee === contractor ? `pay ${shareWords(employee)}` : `pay ${shareWords(employee)} employees, ${shareWords(contractor)} contractors`);

/** "away, told late: charged, no make-up credit, pay 50 %, draws on a package". */
export const consequenceWords = (consequence: Consequence): string =>
  [consequence.charged ? 'charged' : 'not charged', CREDIT_WORDS[consequence.credit], payWords(consequence), consequence.drawsPackage ? 'draws on a package' : 'leaves a package alone'].join(', ');

/** What one table says otherwise than the one before it, a sentence for each mark. */
export const differencesOf = (before: Consequences, after: Consequences): string[] =>
  MARKS.filter((mark) => consequenceWords(before[mark]) !== consequenceWords(after[mark])).map((mark) => `${ATTENDANCE_WORDS[mark]}: ${consequenceWords(after[mark])}`);
