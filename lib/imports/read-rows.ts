import { nameKey } from '../people/names';
import type { LocalDate } from '../time';
import { isBlank, typedText, type Cell } from './cell';
import { readMoney, readLevel, readSeats, readShare } from './amounts';
import { readAnswer, readEmail, readPhone } from './answers';
import { readDate, type DateOrder } from './dates';
import { readFeatures, readSubjects } from './features';
import type { Reading } from './reading';
import type { EnrolmentFacts, FamilyFacts, PayerFacts, Reference, RoomFacts, RowFacts, StudentFacts, TeacherFacts } from './rows';
import { readMinutes, readTime, readWeekday, readWeekdays } from './times';
import type { SheetKind } from './columns';

export type Manner = { currency: string; today: LocalDate; dateOrder: DateOrder | null };
/** Finds what another sheet, or the school, has under this name. */
export type Find = (kind: SheetKind, name: string) => Reading<Reference>;
export type RowToRead = { field: (name: string) => Cell; manner: Manner; find: Find };
export type ReadRow = { facts: RowFacts | null; faults: string[]; title: string };

/** Collects what is wrong with a row instead of stopping at the first fault. */
function collector() {
  const faults: string[] = [];
  const take = <T>(reading: Reading<T>): T | null => {
    if ('value' in reading) return reading.value;
    if (!faults.includes(reading.fault)) faults.push(reading.fault);
    return null;
  };
  return { faults, take, say: (fault: string) => void faults.push(fault) };
}

const LENGTHS = [30, 45, 60] as const;

function readTeacher({ field, manner }: RowToRead): ReadRow {
  const { faults, take, say } = collector();
  const name = typedText(field('name'));
  if (name === '') say('name is missing');
  const rates = LENGTHS.flatMap((lengthMinutes) => {
    const amountMinor = take(readMoney(field(`rate${lengthMinutes}`), manner.currency));
    return amountMinor === null ? [] : [{ lengthMinutes, amountMinor }];
  });
  const facts: TeacherFacts = {
    kind: 'teachers', name, email: take(readEmail(field('email'), 'teacher')), subjects: readSubjects(field('subjects')), levelTo: take(readLevel(field('levelTo'))), rates,
    weekdays: take(readWeekdays(field('days'))) ?? [],
  };
  return { facts, faults, title: name };
}

function readRoom({ field }: RowToRead): ReadRow {
  const { faults, take, say } = collector();
  const name = typedText(field('name'));
  if (name === '') say('name is missing');
  const facts: RoomFacts = { kind: 'rooms', name, personLimit: take(readSeats(field('seats'))) ?? 1, description: typedText(field('features')), features: readFeatures(field('features')) };
  return { facts, faults, title: name };
}

const WHOLE_BP = 10_000;

function readFamily({ field }: RowToRead): ReadRow {
  const { faults, take, say } = collector();
  const name = typedText(field('name'));
  if (name === '') say('family is missing');
  const shareBp = take(readShare(field('payer2Share')));
  const payer = (which: 1 | 2, bp: number): PayerFacts => ({
    name: typedText(field(`payer${which}`)), email: take(readEmail(field(`payer${which}Email`), 'payer')), phone: take(readPhone(field(`payer${which}Phone`), 'payer')), shareBp: bp,
  });
  const hasSecond = !isBlank(field('payer2'));
  if (isBlank(field('payer1'))) say('payer is missing');
  if (hasSecond && isBlank(field('payer2Share'))) say('share of payer 2 is missing');
  if (!hasSecond && !isBlank(field('payer2Share'))) say('payer 2 is missing');
  const second = hasSecond ? (shareBp ?? 0) : 0;
  const facts: FamilyFacts = { kind: 'families', name, payers: [payer(1, WHOLE_BP - second), ...(hasSecond ? [payer(2, second)] : [])] };
  return { facts, faults, title: name };
}

function readStudent({ field, manner, find }: RowToRead): ReadRow {
  const { faults, take, say } = collector();
  const name = typedText(field('name'));
  if (name === '') say('student is missing');
  const family = take(find('families', typedText(field('family'))));
  const bornOn = take(readDate(field('bornOn'), manner.dateOrder, manner.today));
  if (bornOn !== null && (bornOn > manner.today || bornOn < '1900-01-01')) say('birthday does not lie in the past');
  const level = take(readLevel(field('level')));
  const photo = take(readAnswer(field('photo')));
  const facts: StudentFacts | null = family && { kind: 'students', name, family, bornOn, level, photo };
  return { facts, faults, title: name };
}

function readEnrolment({ field, manner, find }: RowToRead): ReadRow {
  const { faults, take } = collector();
  const named = (kind: SheetKind, column: string) => take(find(kind, typedText(field(column))));
  const [student, teacher, room] = [named('students', 'student'), named('teachers', 'teacher'), named('rooms', 'room')];
  const [weekday, startMin, lengthMinutes] = [take(readWeekday(field('day'))), take(readTime(field('start'))), take(readMinutes(field('minutes')))];
  const priceMinor = take(readMoney(field('price'), manner.currency));
  const startsOn = take(readDate(field('from'), manner.dateOrder, manner.today));
  const title = typedText(field('student'));
  if (!student || !teacher || !room || weekday === null || startMin === null || lengthMinutes === null) return { facts: null, faults, title };
  const facts: EnrolmentFacts = { kind: 'enrolments', student, teacher, room, weekday, startMin, lengthMinutes, priceMinor, startsOn };
  return { facts, faults, title };
}

export const READERS: Record<SheetKind, (row: RowToRead) => ReadRow> = { teachers: readTeacher, rooms: readRoom, families: readFamily, students: readStudent, enrolments: readEnrolment };

const keyOf = (reference: Reference): string => ('key' in reference ? reference.key : reference.id);

/** What makes a row the same row in the next workbook: names, not places; a second weekly lesson of the same two people on one day counts on. */
export function rowKey(facts: RowFacts, siteId: string): string {
  switch (facts.kind) {
    case 'teachers': return `teacher:${nameKey(facts.name)}`;
    case 'rooms': return `room:${siteId}:${nameKey(facts.name)}`;
    case 'families': return `family:${nameKey(facts.name)}`;
    case 'students': return `student:${keyOf(facts.family)}:${nameKey(facts.name)}`;
    case 'enrolments': return `enrolment:${keyOf(facts.student)}:${keyOf(facts.teacher)}:${facts.weekday}`;
  }
}
