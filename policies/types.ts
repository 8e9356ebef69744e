import type { AbilityBuilder, MongoAbility } from '@casl/ability';

export const ROLES = ['owner', 'desk', 'teacher', 'student', 'guardian'] as const;
export type Role = (typeof ROLES)[number];

/** Who acts, in one hat. The id lists say which records are this person's own; they are loaded with the session. */
export type Actor = {
  userId: string;
  personId: string;
  role: Role;
  isLead: boolean;
  /** A student's own id; for a guardian the children whose progress and lessons they may see. */
  studentIds: readonly string[];
  payerIds: readonly string[];
  familyIds: readonly string[];
  /** For a teacher: students of their live enrolments, and those they cover today. */
  taughtStudentIds: readonly string[];
  /** For a teacher: lessons of colleagues they take over today. */
  coveredTodayIds: readonly string[];
};

/** To manage is to read, create, update and approve. Taking lists out of the house ('export') is granted on its own, always. */
export type Action = 'read' | 'create' | 'update' | 'approve' | 'manage' | 'export';

export const SUBJECTS = [
  'Account', 'Attendance', 'Audit', 'BusyTime', 'Consent', 'Contact', 'Enquiry', 'Enrolment', 'Excuse', 'Family', 'HealthNote',
  'Hearing', 'HearingNote', 'Import', 'Incident', 'InvoiceShare', 'Invoice', 'Job', 'Ladder', 'LessonNote', 'Occurrence', 'Payment', 'PayLine',
  'PayRun', 'Practice', 'Price', 'Progress', 'Rate', 'Reach', 'Recheck', 'Recital', 'Refund', 'Report', 'Room', 'Scholarship', 'Seat', 'Settings',
  'Student', 'Term', 'TuitionRun',
] as const;
export type SubjectName = (typeof SUBJECTS)[number];

export type AppAbility = MongoAbility<[Action, SubjectName | object]>;
export type Allow = AbilityBuilder<AppAbility>['can'];
