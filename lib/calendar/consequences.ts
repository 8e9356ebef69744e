import * as z from 'zod';
import { BASIS_POINTS } from '../money';
import type { LocalDate } from '../time';
import { MARKS, type MarkedAttendance } from './attendance';

const shareBp = z.number('Enter per cent from 0 to 100.').int('Whole hundredths of a per cent.').min(0, 'Not below 0 %.').max(BASIS_POINTS, 'At most 100 %.');

export const consequenceSchema = z.strictObject({
  /** Counts where tuition is charged lesson by lesson; a term or month fee is owed whatever was marked. */
  charged: z.boolean(),
  /** `capped`: counts to the family's cap per enrolment and term; `free`: outside the cap. */
  credit: z.enum(['none', 'capped', 'free'], 'Choose what credit follows.'),
  payBp: z.strictObject({ employee: shareBp, contractor: shareBp }),
  drawsPackage: z.boolean(),
});
export type Consequence = z.output<typeof consequenceSchema>;

/** What each mark means for charge, credit, pay and package. Every mark is there, or the table is none. */
export const consequencesSchema = z.record(z.enum(MARKS), consequenceSchema);
export type Consequences = Record<MarkedAttendance, Consequence>;

const taught: Consequence = { charged: true, credit: 'none', payBp: { employee: 10_000, contractor: 10_000 }, drawsPackage: true };
const pay = (employee: number, contractor = employee) => ({ employee, contractor });

/** The table of the job map, which holds until the school sets its own from a day on (house rules HR2, HR3, HR8). */
export const CONSEQUENCES: Consequences = {
  present: taught,
  late: taught,
  left_early: taught,
  online: taught,
  away_with_notice: { charged: true, credit: 'capped', payBp: pay(0), drawsPackage: false },
  late_notice: { charged: true, credit: 'none', payBp: pay(5_000), drawsPackage: true },
  no_show: { charged: true, credit: 'none', payBp: pay(10_000), drawsPackage: true },
  excused: { charged: true, credit: 'free', payBp: pay(0), drawsPackage: false },
  teacher_away: { charged: true, credit: 'free', payBp: pay(0), drawsPackage: false },
  school_closed: { charged: true, credit: 'free', payBp: pay(5_000, 0), drawsPackage: false },
};

export type DatedConsequences = { validFrom: LocalDate; validTo: LocalDate | null; table: Consequences };

/** The table in force on the day of the lesson: what is changed later does not judge it again. */
export const consequencesOn = (dated: readonly DatedConsequences[], day: LocalDate): Consequences =>
  dated.find(({ validFrom, validTo }) => validFrom <= day && (validTo === null || day < validTo))?.table ?? CONSEQUENCES;
