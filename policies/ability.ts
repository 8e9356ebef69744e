import { AbilityBuilder, createMongoAbility, subject, type MongoAbility } from '@casl/ability';
import { AppError, notFound } from '@/lib/errors';
import { grantsOf } from './grants';

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
};

export type Action = 'read' | 'create' | 'update' | 'approve' | 'manage';

export const SUBJECTS = [
  'Account', 'Attendance', 'Audit', 'BusyTime', 'Consent', 'Contact', 'Enquiry', 'Enrolment', 'Excuse', 'Family', 'HealthNote',
  'Hearing', 'Import', 'Incident', 'InvoiceShare', 'Invoice', 'Job', 'Ladder', 'LessonNote', 'Occurrence', 'Payment', 'PayLine',
  'PayRun', 'Practice', 'Price', 'Progress', 'Rate', 'Recital', 'Refund', 'Report', 'Room', 'Scholarship', 'Seat', 'Settings',
  'Student', 'Term', 'TuitionRun',
] as const;
export type SubjectName = (typeof SUBJECTS)[number];

export type AppAbility = MongoAbility<[Action, SubjectName | object]>;
export type Allow = AbilityBuilder<AppAbility>['can'];

/** Nothing is allowed until a grant says so, and no grant takes anything away. */
export function abilityFor(actor: Actor): AppAbility {
  const { can: allow, build } = new AbilityBuilder<AppAbility>(createMongoAbility);
  grantsOf(actor, allow);
  return build();
}

export const may = (ability: AppAbility, action: Action, name: SubjectName, record: object = {}): boolean =>
  ability.can(action, subject(name, { ...record }));

/**
 * Stands in front of every operation, on the record itself. A record that this person may not even read
 * answers like one that does not exist; one that may be read but not changed says so.
 */
export function assertCan(ability: AppAbility, action: Action, name: SubjectName, record: object): void {
  if (may(ability, action, name, record)) return;
  if (!may(ability, 'read', name, record)) throw notFound(wordsFor(name));
  throw new AppError('forbidden', `Your role does not let you do this with a ${wordsFor(name)}.`);
}

/** "PayRun" → "pay run". */
export const wordsFor = (name: SubjectName): string => name.replace(/(?<=[a-z])[A-Z]/g, (letter) => ` ${letter}`).toLowerCase();
