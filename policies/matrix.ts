/**
 * Who may do what, in the school's words: the written access matrix. Every cell is tried through the operations of
 * the server on a real database (matrix.test.ts). A lead is a teacher who also looks after the ladder; a substitute
 * is a teacher on the day of a lesson they cover. "own" is one's own lesson, student, child, share or pay line;
 * "all" is everybody's. Rights of several hats add up.
 */
export const COLUMNS = ['owner', 'desk', 'teacher', 'substitute', 'lead', 'student', 'guardian'] as const;
export type Column = (typeof COLUMNS)[number];

export type Verb = 'read' | 'write' | 'approve' | 'export';
type Right = `${Verb} ${'own' | 'all'}`;
type Cells = Record<Column, readonly Right[] | 'none'>;

export type BuiltRow = { thing: string; tries: readonly Verb[]; cells: Cells };
/** A row whose operations are still to come: counted as not yet built, never as passed. */
type LaterRow = { thing: string; from: string };

const readAll = ['read all'] as const;
const readOwn = ['read own'] as const;
const writeAll = ['write all'] as const;
const writeOwn = ['write own'] as const;
const readAndWriteAll = ['read all', 'write all'] as const;
const readAndWriteOwn = ['read own', 'write own'] as const;
const NOBODY: Cells = { owner: 'none', desk: 'none', teacher: 'none', substitute: 'none', lead: 'none', student: 'none', guardian: 'none' };

export const MATRIX = {
  calendar: {
    thing: 'Calendar of the site', tries: ['read', 'write'],
    cells: { owner: readAndWriteAll, desk: readAndWriteAll, teacher: readOwn, substitute: readOwn, lead: readAll, student: readOwn, guardian: readOwn },
  },
  busyTimes: {
    thing: 'When a colleague or a room is taken', tries: ['read'],
    cells: { ...NOBODY, owner: readAll, desk: readAll, teacher: readAll, substitute: readAll, lead: readAll },
  },
  attendance: {
    thing: 'Attendance of a lesson of today', tries: ['write'],
    cells: { ...NOBODY, owner: writeAll, desk: writeAll, teacher: writeOwn, substitute: writeOwn, lead: writeAll },
  },
  attendanceAfter: {
    thing: 'Attendance of an earlier lesson, until its pay run is closed', tries: ['write'],
    cells: { ...NOBODY, owner: writeAll, desk: writeAll, teacher: writeOwn, lead: writeAll },
  },
  attendanceBefore: {
    thing: 'An absence told for a lesson to come, taken down by the school', tries: ['write'],
    cells: { ...NOBODY, owner: writeAll, desk: writeAll, teacher: writeOwn, lead: writeAll },
  },
  attendanceLocked: { thing: 'Attendance of a lesson in a closed pay run', tries: ['write'], cells: NOBODY },
  absence: {
    thing: 'Telling on the screen that a lesson will be missed', tries: ['write'],
    cells: { ...NOBODY, owner: writeAll, desk: writeAll, student: writeOwn, guardian: writeOwn },
  },
  arrival: { thing: 'Seeing a student come in', tries: ['write'], cells: { ...NOBODY, owner: writeAll, desk: writeAll } },
  excuse: { thing: 'Excuse outside the cap', tries: ['write'], cells: { ...NOBODY, owner: writeAll } },
  student: {
    thing: 'A student: name, lessons, make-up credits', tries: ['read'],
    cells: { owner: readAll, desk: readAll, teacher: readOwn, substitute: readOwn, lead: readAll, student: readOwn, guardian: readOwn },
  },
  contacts: { thing: 'Family contacts', tries: ['read'], cells: { ...NOBODY, owner: readAll, desk: readAll } },
  enquiries: { thing: 'Enquiries', tries: ['read', 'write'], cells: { ...NOBODY, owner: readAndWriteAll, desk: readAndWriteAll } },
  prices: { thing: 'Prices', tries: ['read', 'write'], cells: { ...NOBODY, owner: readAndWriteAll, desk: readAll } },
  houseRules: { thing: 'House rules', tries: ['read', 'write'], cells: { ...NOBODY, owner: readAndWriteAll } },
  consequences: { thing: 'What each mark means for charge, credit and pay', tries: ['read', 'write'], cells: { ...NOBODY, owner: readAndWriteAll } },
  terms: { thing: 'Terms and closed days', tries: ['read', 'write'], cells: { ...NOBODY, owner: readAndWriteAll, desk: readAll, teacher: readAll, substitute: readAll, lead: readAll } },
  invoice: { thing: 'Invoice of a family, all shares', tries: ['read'], cells: { ...NOBODY, owner: readAll, desk: readAll } },
  share: { thing: 'One’s own share of an invoice', tries: ['read'], cells: { ...NOBODY, student: readOwn, guardian: readOwn } },
  payment: { thing: 'Payment taken at the desk', tries: ['read', 'write'], cells: { ...NOBODY, owner: readAndWriteAll, desk: readAndWriteAll } },
  tuitionRun: { thing: 'Tuition run', tries: ['read', 'write', 'approve'], cells: { ...NOBODY, owner: [...readAndWriteAll, 'approve all'], desk: readAll } },
  payRun: { thing: 'Pay run', tries: ['read', 'write', 'approve'], cells: { ...NOBODY, owner: [...readAndWriteAll, 'approve all'] } },
  rates: { thing: 'Pay rates of every teacher', tries: ['read', 'write'], cells: { ...NOBODY, owner: readAndWriteAll } },
  payLines: {
    thing: 'A teacher’s pay lines, and a question about them', tries: ['read', 'write'],
    cells: { ...NOBODY, owner: readAndWriteAll, teacher: readAndWriteOwn, substitute: readAndWriteOwn, lead: readAndWriteOwn },
  },
  progress: {
    thing: 'Where a student stands on the ladder', tries: ['read'],
    cells: { ...NOBODY, owner: readAll, teacher: readOwn, substitute: readOwn, lead: readAll, student: readOwn, guardian: readOwn },
  },
  hearing: {
    thing: 'Hearing of a rung, with its keys and the private note', tries: ['read', 'write', 'approve'],
    cells: { ...NOBODY, owner: readAll, teacher: readAndWriteOwn, substitute: readAndWriteOwn, lead: [...readAndWriteAll, 'approve all'] },
  },
  recheck: { thing: 'Asking that a passed rung be heard once more', tries: ['write'], cells: { ...NOBODY, owner: writeAll, lead: writeAll } },
  reach: {
    thing: 'How far a student’s hand reaches', tries: ['write'],
    cells: { ...NOBODY, owner: writeAll, teacher: writeOwn, substitute: writeOwn, lead: writeAll },
  },
  ladder: {
    thing: 'Ladder edition', tries: ['read', 'approve'],
    cells: { owner: ['read all', 'approve all'], desk: readAll, teacher: readAll, substitute: readAll, lead: readAll, student: readAll, guardian: readAll },
  },
  accounts: { thing: 'Who may sign in', tries: ['read', 'write'], cells: { ...NOBODY, owner: readAndWriteAll } },
  exports: { thing: 'Export of personal data: a list taken out as a file', tries: ['export'], cells: { ...NOBODY, owner: ['export all'] } },
  imports: { thing: 'Import at start-up', tries: ['read'], cells: { ...NOBODY, owner: readAll } },
} as const satisfies Record<string, BuiltRow>;

export type RowName = keyof typeof MATRIX;

export const LATER: readonly LaterRow[] = [
  { thing: 'Own contacts, seen and changed', from: 'the family’s own page' },
  { thing: 'Health mark', from: 'the student’s health and consents' },
  { thing: 'Court note, incident', from: 'incidents' },
  { thing: 'Own rate', from: 'rates on the teacher’s page' },
  { thing: 'Write-off', from: 'corrections of invoices' },
  { thing: 'Refund over the desk limit', from: 'refunds' },
  { thing: 'Clip of a hearing', from: 'clips by consent' },
  { thing: 'Change of a rung in a draft edition', from: 'editing the ladder' },
  { thing: 'Term report', from: 'reports' },
  { thing: 'Scholarship', from: 'scholarships' },
  { thing: 'Export of one’s own data, or a child’s', from: 'export and erasure' },
  { thing: 'Audit', from: 'the audit screen' },
];
