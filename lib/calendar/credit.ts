import type { HouseRules } from '../house-rules';
import { addDays, type LocalDate } from '../time';
import { creditCauseOf, type MarkedAttendance } from './attendance';
import type { Consequences } from './consequences';

export type CreditRules = { capPerTerm: number; validDays: number; consequences: Consequences };
export const creditRulesOf = (rules: HouseRules): CreditRules =>
  ({ capPerTerm: rules['credit.cap_per_term'], validDays: rules['credit.valid_days'], consequences: rules['attendance.consequences'] });

export type CreditVerdict =
  | { credit: { cause: 'family' | 'school' | 'owner'; countsToCap: boolean; lastOn: LocalDate }; sentence: string }
  | { credit: null; sentence: string };

/**
 * Whether a missed lesson gives a make-up credit, and until when it is good. The make-up must take place on or
 * before the last day (house rules HR2, HR3). The rules are those of the missed
 * lesson's day. `cappedSoFar` counts this term's credits of the same enrolment.
 */
export function creditFor(attendance: MarkedAttendance, missedOn: LocalDate, cappedSoFar: number, { capPerTerm, validDays, consequences }: CreditRules): CreditVerdict {
  const kind = consequences[attendance].credit;
  if (kind === 'none') return { credit: null, sentence: 'No make-up credit for this.' };
  if (kind === 'capped' && cappedSoFar >= capPerTerm) {
    return { credit: null, sentence: `No make-up credit: this term's ${capPerTerm} have been given already.` };
  }
  const lastOn = addDays(missedOn, validDays);
  return { credit: { cause: creditCauseOf(attendance), countsToCap: kind === 'capped', lastOn }, sentence: `A make-up credit, good until ${lastOn}.` };
}
