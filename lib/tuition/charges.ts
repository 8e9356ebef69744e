import { teachingDates, type Term } from '../calendar/term';
import type { Explained, MoneyWords } from '../explained';
import { plural } from '../format';
import { weekdayOf, type LocalDate } from '../time';
import { prorateMonth, prorateTerm, type MonthRule } from './proration';
import { tuitionByCount } from './term-tuition';

export type TuitionModel = 'per_term_count' | 'per_term_flat' | 'monthly_flat' | 'per_lesson' | 'package' | 'group_seat';

/** One enrolment as the tuition run sees it. */
export type EnrolmentFacts = {
  enrolmentId: string; studentId: string; studentName: string; subjectLabel: string; lessonLabel: string;
  lengthMinutes: number; model: TuitionModel; startsOn: LocalDate; unitMinor: number;
  /** Dates of its lessons inside the period and the enrolment; for charges lesson by lesson, those marked and not yet billed. */
  lessonDates: readonly LocalDate[];
  /** Dates on which that weekday is taught in the whole period. */
  plannedDates: readonly LocalDate[];
};
export type Charge = { quantity: number; unitMinor: number; grossMinor: number };

/** What one enrolment is charged for a period, by its tuition model; null when this period charges nothing for it. */
export function chargeFor(facts: EnrolmentFacts, how: { monthRule: MonthRule; words: MoneyWords }): Explained<Charge> | null {
  const { words } = how;
  const lessons = facts.lessonDates.length;
  const asCharge = (quantity: number, unitMinor: number, { value, steps }: Explained<number>): Explained<Charge> => ({ value: { quantity, unitMinor, grossMinor: value }, steps });
  switch (facts.model) {
    case 'package': return null;
    case 'monthly_flat': {
      const start = { feeMinor: facts.unitMinor, startsOn: startInMonth(facts), lessonDates: facts.plannedDates, rule: how.monthRule };
      return asCharge(1, facts.unitMinor, prorateMonth(start, words));
    }
    case 'per_term_flat': {
      const planned = facts.plannedDates.length;
      if (planned === 0) return null;
      return asCharge(1, facts.unitMinor, prorateTerm({ feeMinor: facts.unitMinor, planned, remaining: lessons }, words));
    }
    case 'per_lesson':
    case 'per_term_count':
    case 'group_seat':
      if (lessons === 0) return null;
      return asCharge(lessons, facts.unitMinor, tuitionByCount({ lessons, unitMinor: facts.unitMinor, lengthMinutes: facts.lengthMinutes }, words));
  }
}

/** A month that began before the enrolment counts from its start; any other from the first. */
function startInMonth({ plannedDates, startsOn }: EnrolmentFacts): LocalDate {
  const month = plannedDates[0]?.slice(0, 7) ?? startsOn.slice(0, 7);
  return startsOn.startsWith(month) ? startsOn : `${month}-01`;
}

/** The dates on which a lesson that falls on these weekdays would be taught in the whole period. */
export const plannedDatesOf = (lessonDates: readonly LocalDate[], period: Term, closed: ReadonlySet<LocalDate>): LocalDate[] =>
  [...new Set(lessonDates.map(weekdayOf))].flatMap((weekday) => teachingDates(weekday, period, closed)).sort();

export const chargeText = (facts: EnrolmentFacts, charge: Charge): string => {
  const what = `${facts.studentName}: ${facts.subjectLabel}, ${lessonWords(facts)}`;
  if (facts.model === 'monthly_flat') return `${what}, monthly fee`;
  return facts.model === 'per_term_flat' ? `${what}, term fee` : `${what}, ${plural(charge.quantity, 'lesson')}`;
};

const lessonWords = ({ lessonLabel, lengthMinutes }: EnrolmentFacts) => `${lengthMinutes} min ${lessonLabel.toLowerCase()}`;

export const missingPriceText = (facts: EnrolmentFacts): string =>
  `There is no price for a ${lessonWords(facts)}, which ${facts.studentName} has.`;
