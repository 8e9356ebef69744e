import { addDays, type LocalDate } from '../time';

/** Days until a passed rung comes back, by box: common practice of spaced review, after the school's own rules. */
export const REVIEW_INTERVALS_DAYS = [1, 3, 7, 14, 30, 60] as const;
const LAST_BOX = REVIEW_INTERVALS_DAYS.length;
/** After so many failures in a row the teacher is told. */
export const FAILURES_TELL_TEACHER = 2;

/** A passed rung on its way back: which box it lies in, when it is due, and how often it failed lately. */
export type ReviewCard = { box: number; dueOn: LocalDate; failuresInRow: number };

const dueAfter = (on: LocalDate, box: number): LocalDate => addDays(on, REVIEW_INTERVALS_DAYS[box - 1] ?? REVIEW_INTERVALS_DAYS[LAST_BOX - 1] ?? 0);

/** A rung enters the review on the day it is passed. */
export const firstReview = (passedOn: LocalDate): ReviewCard => ({ box: 1, dueOn: dueAfter(passedOn, 1), failuresInRow: 0 });

/**
 * What a review does to its card. The days count from the day it was really done, not from the day it was due:
 * who comes back late is not punished with a pile. A success goes one box up, a failure back to the first.
 */
export function afterReview({ box, failuresInRow }: ReviewCard, { doneOn, isGood }: { doneOn: LocalDate; isGood: boolean }): ReviewCard {
  const next = isGood ? Math.min(box + 1, LAST_BOX) : 1;
  return { box: next, dueOn: dueAfter(doneOn, next), failuresInRow: isGood ? 0 : failuresInRow + 1 };
}

export const tellsTeacher = ({ failuresInRow }: Pick<ReviewCard, 'failuresInRow'>): boolean => failuresInRow >= FAILURES_TELL_TEACHER;

/**
 * Today's reviews, the longest overdue first, and no more than the cap: a holiday does not become an avalanche. What
 * is left waits until tomorrow.
 */
export const dueReviews = <Card extends Pick<ReviewCard, 'dueOn' | 'box'>>(cards: readonly Card[], today: LocalDate, mostPerDay: number): Card[] =>
  cards.filter(({ dueOn }) => dueOn <= today).sort((a, b) => a.dueOn.localeCompare(b.dueOn) || a.box - b.box).slice(0, Math.max(0, mostPerDay));
