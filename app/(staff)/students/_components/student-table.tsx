'use client';

import { DataTable } from '@/components/ui/data-table';
import type { Column } from '@/components/ui/data-table-core';
import { Sheet } from '@/components/ui/sheet';
import { EmptyState } from '@/components/ui/states';
import type { StudentListRow } from '@/db/student-lists';
import { weeklyWords } from '@/lib/calendar/weekday-words';
import { ageOn, type LocalDate } from '@/lib/time';

type StudentTableProps = { rows: readonly StudentListRow[]; today: LocalDate; showsFamily: boolean; mayExport: boolean };

export function StudentTable({ rows, today, showsFamily, mayExport }: StudentTableProps) {
  const columns: Column<StudentListRow>[] = [
    { id: 'name', header: 'Student', isTitle: true, value: ({ name }) => name },
    { id: 'age', header: 'Age', align: 'right', value: ({ bornOn }) => (bornOn ? ageOn(bornOn, today) : null) },
    { id: 'weekly', header: 'Weekly lesson', value: ({ weekday, startMin }) => (weekday === null || startMin === null ? null : weekday * 1440 + startMin), cell: ({ weekday, startMin, lengthMinutes, enrolments }) => (enrolments === 0 ? <span className="text-ink-3">not enrolled</span> : <>{weeklyWords(weekday, startMin, lengthMinutes)}{enrolments > 1 ? ` and ${enrolments - 1} more` : ''}</>) },
    { id: 'teacher', header: 'Teacher', value: ({ teacherName }) => teacherName },
    { id: 'room', header: 'Room', value: ({ roomName }) => roomName },
    ...(showsFamily ? [{ id: 'family', header: 'Family', value: ({ familyName }: StudentListRow) => familyName }] : []),
  ];
  return (
    <Sheet flush>
      <DataTable label="students" rows={rows} columns={columns} rowKey={({ id }) => id} rowHref={({ id }) => `/students/${id}`} initialSort={{ id: 'name' }} exportOf={mayExport ? { list: 'students', rows: rows.length } : null}
        empty={<EmptyState title="No students yet">Students appear with their trial lesson or their enrolment, or all at once through the importer.</EmptyState>} />
    </Sheet>
  );
}
