/** The kinds of sheets that a school can begin with, in the order in which they build on each other. */
export const SHEET_KINDS = ['teachers', 'rooms', 'families', 'students', 'enrolments'] as const;
export type SheetKind = (typeof SHEET_KINDS)[number];

export const KIND_WORDS: Record<SheetKind, { one: string; many: string }> = {
  teachers: { one: 'teacher', many: 'Teachers' },
  rooms: { one: 'room', many: 'Rooms' },
  families: { one: 'family', many: 'Families' },
  students: { one: 'student', many: 'Students' },
  enrolments: { one: 'enrolment', many: 'Enrolments' },
};

export type ColumnSpec = { field: string; label: string; isNeeded: boolean; isDate?: boolean; /** Headings under which it is known, without spaces and signs. */ headings: readonly string[] };

const column = (field: string, label: string, headings: string, over: Partial<ColumnSpec> = {}): ColumnSpec =>
  ({ field, label, isNeeded: false, headings: headings.split(' '), ...over });
const needed = { isNeeded: true };

export const COLUMNS: Record<SheetKind, readonly ColumnSpec[]> = {
  teachers: [
    column('name', 'Name', 'name teacher teachername fullname', needed),
    column('email', 'E-mail', 'email emailaddress mail'),
    column('subjects', 'Instruments', 'instruments instrument subjects subject teaches'),
    column('levelTo', 'Highest level', 'highestlevel maxlevel levelto uptolevel level'),
    column('rate30', 'Rate 30', 'rate30 rate30min pay30'),
    column('rate45', 'Rate 45', 'rate45 rate45min pay45'),
    column('rate60', 'Rate 60', 'rate60 rate60min pay60'),
    column('days', 'Days', 'days weekdays workingdays teachingdays'),
  ],
  rooms: [
    column('name', 'Room', 'room name roomname', needed),
    column('seats', 'Seats', 'seats capacity people personlimit', needed),
    column('features', 'Has', 'has features equipment instruments'),
  ],
  families: [
    column('name', 'Family', 'family familyname account name', needed),
    column('payer1', 'Payer 1', 'payer1 payer payername guardian guardian1 parent', needed),
    column('payer1Email', 'Payer 1 e-mail', 'payer1email payeremail email guardianemail'),
    column('payer1Phone', 'Payer 1 phone', 'payer1phone payerphone phone telephone mobile'),
    column('payer2', 'Payer 2', 'payer2 secondpayer guardian2'),
    column('payer2Email', 'Payer 2 e-mail', 'payer2email secondpayeremail'),
    column('payer2Phone', 'Payer 2 phone', 'payer2phone secondpayerphone'),
    column('payer2Share', 'Payer 2 share %', 'payer2share payer2sharepercent share payer2percent'),
  ],
  students: [
    column('name', 'Student', 'student name studentname fullname', needed),
    column('family', 'Family', 'family familyname account', needed),
    column('bornOn', 'Born', 'born birthday birthdate dateofbirth dob', { isDate: true }),
    column('level', 'Level', 'level ladderlevel'),
    column('photo', 'Can be photographed', 'canbephotographed photo photos photoconsent photography'),
  ],
  enrolments: [
    column('student', 'Student', 'student name studentname', needed),
    column('teacher', 'Teacher', 'teacher teachername', needed),
    column('day', 'Day', 'day weekday', needed),
    column('start', 'Start', 'start time starttime at', needed),
    column('minutes', 'Minutes', 'minutes length duration min', needed),
    column('room', 'Room', 'room roomname', needed),
    column('price', 'Price', 'price priceperlesson fee lessonprice'),
    column('from', 'From', 'from startdate since starts begins', { isDate: true }),
  ],
};
