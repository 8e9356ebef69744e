'use client';

import { Chip, type ChipTone } from '@/components/ui/chip';
import { DataTable } from '@/components/ui/data-table';
import type { Column } from '@/components/ui/data-table-core';
import { Sheet } from '@/components/ui/sheet';
import { EmptyState } from '@/components/ui/states';
import { formatInstant } from '@/lib/format';
import type { ImportListRow } from '@/lib/imports/server/import-screen';

const STATES: Record<ImportListRow['state'], { word: string; tone: ChipTone }> = {
  uploaded: { word: 'being read', tone: 'neutral' }, unreadable: { word: 'could not be read', tone: 'bad' }, checked: { word: 'checked', tone: 'wait' }, imported: { word: 'brought in', tone: 'ok' }, undone: { word: 'undone', tone: 'neutral' },
};

export function ImportList({ rows, locale, zone }: { rows: readonly ImportListRow[]; locale: string; zone: string }) {
  const columns: Column<ImportListRow>[] = [
    { id: 'name', header: 'Workbook', isTitle: true, value: ({ fileName }) => fileName },
    { id: 'state', header: 'State', value: ({ state }) => STATES[state].word, cell: ({ state }) => <Chip tone={STATES[state].tone}>{STATES[state].word}</Chip> },
    { id: 'new', header: 'New rows', align: 'right', value: ({ newRows }) => newRows },
    { id: 'problems', header: 'Left out', align: 'right', value: ({ problems }) => problems },
    { id: 'when', header: 'Chosen', value: ({ createdAt }) => createdAt, cell: ({ createdAt }) => formatInstant(createdAt, { locale, zone }) },
    { id: 'who', header: 'By', value: ({ byName }) => byName, hidden: true },
  ];
  return (
    <Sheet flush>
      <DataTable label="imports" rows={rows} columns={columns} rowKey={({ batchId }) => batchId} rowHref={({ batchId }) => `/import/${batchId}`} initialSort={{ id: 'when', desc: true }}
        empty={<EmptyState title="Nothing has been brought in yet">Choose the workbook with your teachers, rooms, families, students and their weekly lessons. Rows with a fault are named and left out; the rest can come in without them, and be taken back whole.</EmptyState>} />
    </Sheet>
  );
}
