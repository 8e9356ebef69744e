'use client';

import { useState } from 'react';
import { Chip, type ChipTone } from '@/components/ui/chip';
import { DataTable } from '@/components/ui/data-table';
import type { Column } from '@/components/ui/data-table-core';
import { Checkbox } from '@/components/ui/inputs';
import { Sheet } from '@/components/ui/sheet';
import { EmptyState } from '@/components/ui/states';
import { Tabs } from '@/components/ui/tabs';
import { isProblem } from '@/lib/imports/control-totals';
import { VERDICT_WORDS, type Verdict } from '@/lib/imports/rows';
import type { PreviewRow, PreviewSheet, SheetReading } from '@/lib/imports/server/import-screen';

const TONES: Record<Verdict, ChipTone> = { new: 'ok', same: 'neutral', changed: 'wait', duplicate: 'bad', faulty: 'bad', blank: 'neutral' };

const asTyped = (cells: readonly string[]): string => cells.filter((cell) => cell !== '').join(' · ');

const COLUMNS: Column<PreviewRow>[] = [
  { id: 'row', header: 'Row', align: 'right', value: ({ rowNo }) => rowNo },
  {
    id: 'title', header: 'Who or what, and the row as typed', isTitle: true, value: ({ title }) => title,
    cell: ({ title, cells }) => <>{title === '' ? <span className="font-normal text-ink-3">no name</span> : title}<span className="block text-small font-normal text-ink-3">{asTyped(cells)}</span></>,
  },
  { id: 'verdict', header: 'Verdict', value: ({ verdict }) => VERDICT_WORDS[verdict], cell: ({ verdict }) => <Chip tone={TONES[verdict]}>{VERDICT_WORDS[verdict]}</Chip> },
  { id: 'reason', header: 'Why', value: ({ reason }) => reason, cell: ({ reason }) => (reason === '' ? '' : <span className="block md:min-w-[22ch]">{reason}</span>) },
  { id: 'cells', header: 'Cells', hidden: true, value: ({ cells }) => asTyped(cells) },
];

/** A tab per sheet, every row with its verdict; the ones left out can be looked at alone. */
export function RowTables({ sheets, readings }: { sheets: readonly PreviewSheet[]; readings: readonly SheetReading[] }) {
  const problems = sheets.reduce((sum, { rows }) => sum + rows.filter(isProblem).length, 0);
  const [onlyProblems, setOnlyProblems] = useState(false);
  const unread = readings.filter(({ mapping }) => mapping.kind === null).map(({ mapping }) => mapping.sheet);
  if (sheets.length === 0) return <Sheet><EmptyState title="No sheet of this workbook is known">Its sheets have none of the headings that the school can read. Say at the right what they are, or choose another workbook.</EmptyState></Sheet>;
  const shown = (rows: readonly PreviewRow[]) => (onlyProblems ? rows.filter(isProblem) : rows);
  return (
    <div className="min-w-0">
      {problems > 0 ? <Checkbox label={`Only the ${problems} rows that are left out`} checked={onlyProblems} onChange={(event) => setOnlyProblems(event.target.checked)} className="mb-2" /> : null}
      {unread.length > 0 ? <p className="mb-2 text-small text-ink-3">Not read: {unread.join(', ')}.</p> : null}
      <Tabs label="Sheets" tabs={sheets.map(({ sheet, rows }) => ({
        key: sheet, label: <>{sheet} <span className="num font-normal">{rows.filter(isProblem).length > 0 ? `${rows.length}, ${rows.filter(isProblem).length} left out` : rows.length}</span></>,
        content: (
          <Sheet flush>
            <DataTable key={String(onlyProblems)} label={sheet} rows={shown(rows)} columns={COLUMNS} rowKey={({ rowNo }) => String(rowNo)} initialSort={{ id: 'row' }}
              empty={onlyProblems ? <EmptyState title="No row of this sheet is left out">Untick the box above to see all of them.</EmptyState> : <EmptyState title="This sheet has no rows">There is nothing under its headings.</EmptyState>} />
          </Sheet>
        ),
      }))} />
    </div>
  );
}
