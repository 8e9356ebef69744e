/**
 * One attendance fact decides five things separately: the family's charge, a make-up credit, the teacher's pay,
 * a package and the progress record. This is the consequence table of the job map as dated data; a school's own
 * table replaces it through the setting `attendance.consequences`. "Not yet marked" is a state of its own.
 */
export const ATTENDANCE = [
  'expected', 'present', 'late', 'left_early', 'online', 'away_with_notice', 'late_notice', 'no_show', 'excused', 'teacher_away', 'school_closed',
] as const;
export type Attendance = (typeof ATTENDANCE)[number];
export type MarkedAttendance = Exclude<Attendance, 'expected'>;

export type Consequence = {
  charged: boolean;
  /** `capped`: counts to the family's cap per enrolment and term; `free`: outside the cap. */
  credit: 'none' | 'capped' | 'free';
  payBp: { employee: number; contractor: number };
  drawsPackage: boolean;
  taught: boolean;
};

const taught: Consequence = { charged: true, credit: 'none', payBp: { employee: 10_000, contractor: 10_000 }, drawsPackage: true, taught: true };
const pay = (employee: number, contractor = employee) => ({ employee, contractor });

export const CONSEQUENCES: Record<MarkedAttendance, Consequence> = {
  present: taught,
  late: taught,
  left_early: taught,
  online: taught,
  away_with_notice: { charged: true, credit: 'capped', payBp: pay(0), drawsPackage: false, taught: false },
  late_notice: { charged: true, credit: 'none', payBp: pay(5_000), drawsPackage: true, taught: false },
  no_show: { charged: true, credit: 'none', payBp: pay(10_000), drawsPackage: true, taught: false },
  excused: { charged: true, credit: 'free', payBp: pay(0), drawsPackage: false, taught: false },
  teacher_away: { charged: true, credit: 'free', payBp: pay(0), drawsPackage: false, taught: false },
  school_closed: { charged: true, credit: 'free', payBp: pay(5_000, 0), drawsPackage: false, taught: false },
};

export const ATTENDANCE_WORDS: Record<Attendance, string> = {
  expected: 'not marked',
  present: 'here',
  late: 'came late',
  left_early: 'left early',
  online: 'joined online',
  away_with_notice: 'away, told in time',
  late_notice: 'away, told late',
  no_show: 'did not come',
  excused: 'excused',
  teacher_away: 'teacher away',
  school_closed: 'school closed',
};

/** Which side of the lesson a credit speaks for. */
export const creditCauseOf = (attendance: MarkedAttendance): 'family' | 'school' | 'owner' => {
  if (attendance === 'excused') return 'owner';
  return attendance === 'teacher_away' || attendance === 'school_closed' ? 'school' : 'family';
};

/** The state of the whole lesson once every seat is marked; null while one is not. */
export function stateWhenMarked(marks: readonly Attendance[]): 'taught' | 'not_taught' | null {
  if (marks.length === 0 || marks.includes('expected')) return null;
  return marks.some((mark) => mark !== 'expected' && CONSEQUENCES[mark].taught) ? 'taught' : 'not_taught';
}
