/**
 * One attendance fact decides five things separately: the family's charge, a make-up credit, the teacher's pay, a
 * package and the progress record. The first four follow from the table in `consequences.ts`, which a school changes
 * from a day on; whether the lesson was taught follows from the meaning of the mark. "Not yet marked" is a state of its own.
 */
export const ATTENDANCE = [
  'expected', 'present', 'late', 'left_early', 'online', 'away_with_notice', 'late_notice', 'no_show', 'excused', 'teacher_away', 'school_closed',
] as const;
export type Attendance = (typeof ATTENDANCE)[number];
export type MarkedAttendance = Exclude<Attendance, 'expected'>;

export const MARKS = ATTENDANCE.filter((attendance) => attendance !== 'expected');

const TAUGHT: ReadonlySet<Attendance> = new Set<Attendance>(['present', 'late', 'left_early', 'online']);
export const isTaught = (attendance: Attendance): boolean => TAUGHT.has(attendance);

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
  return marks.some(isTaught) ? 'taught' : 'not_taught';
}
