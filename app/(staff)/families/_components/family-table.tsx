'use client';

import { DataTable } from '@/components/ui/data-table';
import type { Column } from '@/components/ui/data-table-core';
import { Sheet } from '@/components/ui/sheet';
import { EmptyState } from '@/components/ui/states';
import type { FamilyListRow } from '@/db/student-lists';

const COLUMNS: Column<FamilyListRow>[] = [
  { id: 'name', header: 'Family', isTitle: true, value: ({ name }) => name },
  { id: 'students', header: 'Students', value: ({ students }) => students },
  { id: 'payers', header: 'Payers', value: ({ payers }) => payers },
];

export function FamilyTable({ rows, mayExport }: { rows: readonly FamilyListRow[]; mayExport: boolean }) {
  return (
    <Sheet flush>
      <DataTable label="families" rows={rows} columns={COLUMNS} rowKey={({ id }) => id} rowHref={({ id }) => `/families/${id}`} initialSort={{ id: 'name' }} exportOf={mayExport ? { list: 'families', rows: rows.length } : null}
        empty={<EmptyState title="No families yet">A family account opens with the first enrolment of a student, or through the importer.</EmptyState>} />
    </Sheet>
  );
}
