import type { Actor, Allow, Role, SubjectName } from './types';

type Grant = (actor: Actor, allow: Allow) => void;

/** Everything that the owner keeps in hand. Hearings are left to those who heard them: the owner reads. */
const OWNER_MANAGES: SubjectName[] = [
  'Account', 'Attendance', 'BusyTime', 'Consent', 'Contact', 'Enquiry', 'Enrolment', 'Excuse', 'Family', 'HealthNote', 'Import',
  'Incident', 'Invoice', 'InvoiceShare', 'Ladder', 'LessonNote', 'Occurrence', 'Payment', 'PayLine', 'PayRun', 'Price', 'Rate',
  'Reach', 'Recheck', 'Recital', 'Refund', 'Report', 'Room', 'Scholarship', 'Seat', 'Settings', 'Student', 'Term', 'TuitionRun',
];

const DESK_MANAGES: SubjectName[] = [
  'Attendance', 'BusyTime', 'Consent', 'Contact', 'Enquiry', 'Enrolment', 'Family', 'Invoice', 'InvoiceShare', 'Occurrence',
  'Payment', 'Recital', 'Room', 'Seat', 'Student',
];

/** Lists that may be taken out of the house as files, by the owner alone: each names people or what they pay. */
const OWNER_EXPORTS: SubjectName[] = ['Student', 'Family', 'Enquiry', 'Invoice', 'Payment', 'TuitionRun', 'PayRun'];

const grants: Record<Role, Grant> = {
  owner: (_actor, allow) => {
    allow('manage', OWNER_MANAGES);
    allow('export', OWNER_EXPORTS);
    allow('read', ['Hearing', 'HearingNote', 'Progress', 'Practice', 'Audit']);
  },

  desk: (actor, allow) => {
    allow('manage', DESK_MANAGES);
    allow('read', ['Price', 'Term', 'Ladder', 'HealthNote', 'TuitionRun']);
    allow('read', 'Audit', { actorId: actor.personId });
  },

  teacher: (actor, allow) => {
    const taught = { studentId: { $in: [...actor.taughtStudentIds] } };
    allow('read', ['Room', 'Term', 'Ladder', 'BusyTime', 'Recital']);
    const planned: Record<string, string>[] = [{ plannedTeacherId: actor.personId }, { taughtById: actor.personId }];
    for (const mine of planned) {
      allow('read', ['Occurrence', 'Seat'], mine);
      allow('read', 'Attendance', mine);
    }
    // One's own lessons are marked and put right until pay is closed; a lesson taken over, on its day.
    allow(['create', 'update'], 'Attendance', { plannedTeacherId: actor.personId });
    allow(['create', 'update'], 'Attendance', { occurrenceId: { $in: [...actor.coveredTodayIds] } });
    // The private note of a hearing and its keys are for those who teach: families read the result in plain words.
    allow('read', ['Progress', 'Hearing', 'HearingNote', 'Practice', 'HealthNote'], taught);
    allow('read', 'Student', { id: { $in: [...actor.taughtStudentIds] } });
    // A hand is measured by whoever sits beside it.
    allow(['read', 'update'], 'Reach', taught);
    allow(['read', 'create', 'update'], ['LessonNote', 'Report'], taught);
    allow('create', 'Practice', taught);
    allow(['create', 'update'], 'Hearing', { ...taught, assessorId: actor.personId });
    allow('read', ['PayLine', 'Rate'], { personId: actor.personId });
    allow('update', 'PayLine', { personId: actor.personId });
    allow('read', 'Audit', { actorId: actor.personId });
    if (actor.isLead) grantLead(actor, allow);
  },

  student: (actor, allow) => {
    const own = { studentId: { $in: [...actor.studentIds] } };
    allow('read', ['Progress', 'Hearing', 'Practice', 'Report', 'Seat', 'Enrolment', 'LessonNote'], own);
    allow('read', 'Student', { id: { $in: [...actor.studentIds] } });
    allow('create', 'Practice', own);
    allow('read', ['Ladder', 'Recital']);
    allow(['read', 'update'], 'Contact', { personId: actor.personId });
    // Who pays for themselves is of age and cancels for themselves; a minor asks a guardian.
    if (actor.payerIds.length > 0) allow('update', 'Seat', own);
    grantPayer(actor, allow);
  },

  guardian: (actor, allow) => {
    const child = { studentId: { $in: [...actor.studentIds] } };
    allow('read', ['Progress', 'Hearing', 'Practice', 'Report', 'Seat', 'Enrolment', 'LessonNote'], child);
    allow('update', 'Seat', child);
    allow('read', 'Student', { id: { $in: [...actor.studentIds] } });
    allow(['read', 'create', 'update'], ['HealthNote', 'Consent'], child);
    allow(['read', 'update'], 'Contact', { personId: actor.personId });
    allow('read', ['Ladder', 'Recital']);
    grantPayer(actor, allow);
  },
};

/** The lead keeps one standard: sees every student's ladder, marks what was left unmarked, agrees to skips and further attempts, asks for a re-check, looks after the rungs. */
function grantLead(actor: Actor, allow: Allow): void {
  allow('read', ['Progress', 'Hearing', 'HearingNote', 'Student', 'Occurrence', 'Seat', 'Practice']);
  allow(['read', 'create', 'update'], 'Attendance');
  allow(['create', 'update'], 'Hearing', { assessorId: actor.personId });
  allow('approve', ['Hearing', 'Report']);
  allow(['read', 'update'], 'Reach');
  allow(['read', 'create'], 'Recheck');
  allow('read', 'Report');
  allow(['read', 'update'], 'Ladder');
}

/** Money is seen by the payer whose share it is, and by nobody else in the family. */
function grantPayer(actor: Actor, allow: Allow): void {
  const payer = { payerId: { $in: [...actor.payerIds] } };
  allow('read', ['InvoiceShare', 'Payment'], payer);
  allow('create', 'Payment', payer);
}

export function grantsOf(actor: Actor, allow: Allow): void {
  grants[actor.role](actor, allow);
  // Anybody may follow the slow work they asked for.
  allow('read', 'Job', { askedByUserId: actor.userId });
}
