import 'server-only';
import type { StudentListRow } from '@/db/student-lists';
import { WEEKDAYS } from '@/lib/calendar/weekday-words';
import type { Cell } from '@/lib/exports/server/cells';
import type { ListColumn, TakenList } from '@/lib/exports/server/list-file';
import type { Context } from '@/lib/server/context';
import { ageOn, clockOf, type LocalDate } from '@/lib/time';
import { assertCan } from '@/policies/ability';
import { readStudents } from './read-students';

const COLUMNS: readonly ListColumn[] = [
  { header: 'Student', width: 28 }, { header: 'Age', width: 8 }, { header: 'Enrolments', width: 11 }, { header: 'Weekday', width: 12 }, { header: 'Start', width: 8 },
  { header: 'Minutes', width: 9 }, { header: 'Teacher', width: 24 }, { header: 'Room', width: 14 }, { header: 'Family', width: 24 },
];

/** The students as their list shows them, with the first weekly lesson. No contacts, no health, nothing from the ladder. */
export async function takeStudentList(context: Context): Promise<TakenList> {
  assertCan(context.ability, 'export', 'Student', {});
  const rows = await readStudents(context);
  return { name: 'students', tableName: 'person', rowId: 'students', columns: COLUMNS, rows: rows.map((row) => cellsOf(row, context.today)) };
}

const cellsOf = ({ name, bornOn, enrolments, weekday, startMin, lengthMinutes, teacherName, roomName, familyName }: StudentListRow, today: LocalDate): Cell[] => [
  name, bornOn ? ageOn(bornOn, today) : null, enrolments, weekday === null ? null : (WEEKDAYS[weekday - 1] ?? null), startMin === null ? null : clockOf(startMin), lengthMinutes, teacherName, roomName, familyName,
];
