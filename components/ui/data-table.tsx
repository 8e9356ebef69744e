'use client';

import { createColumnHelper, useTable, type SortingState } from '@tanstack/react-table';
import { useRouter } from 'next/navigation';
import { useMemo, useState, type ReactNode } from 'react';
import type { ListOffer } from '@/lib/exports/lists';
import { Button } from './button';
import { compareValues, tableFeatureSet, type Column } from './data-table-core';
import { TableHead } from './data-table-head';
import { BodyRow } from './data-table-row';
import { TableTools } from './data-table-tools';
import { ErrorState, ListSkeleton } from './states';

type DataTableProps<Row> = {
  label: string;
  rows: readonly Row[];
  columns: readonly Column<Row>[];
  rowKey: (row: Row) => string;
  /** Where a row leads; the whole row can be pressed and opened with Enter. */
  rowHref?: (row: Row) => string;
  empty: ReactNode;
  initialSort?: { id: string; desc?: boolean };
  /** The whole list as a file, where this person may take it. */
  exportOf?: ListOffer | null;
  tools?: ReactNode;
  footer?: ReactNode;
  /** For rows that the browser asks for: a skeleton of their size, or what to do when they do not come. */
  state?: 'loading' | 'failed';
  onRetry?: () => void;
};

/** A phone shows so many cards at first: a list of a whole school is searched there, not scrolled. */
const ROWS_ON_PHONE = 30;

/** A table that sorts, searches, hides columns, moves by keyboard, and becomes a list of cards on a phone. */
export function DataTable<Row>({ label, rows, columns, rowKey, rowHref, empty, initialSort, exportOf, tools, footer, state, onRetry }: DataTableProps<Row>) {
  const router = useRouter();
  const [sorting, setSorting] = useState<SortingState>(initialSort ? [{ id: initialSort.id, desc: initialSort.desc ?? false }] : []);
  const [search, setSearch] = useState('');
  const [onPhone, setOnPhone] = useState(ROWS_ON_PHONE);
  const [activeKey, setActiveKey] = useState<string | null>(null);
  const [visibility, setVisibility] = useState<Record<string, boolean>>(() => Object.fromEntries(columns.filter(({ hidden }) => hidden).map(({ id }) => [id, false])));
  const data = useMemo(() => rows.map((row) => ({ row })), [rows]);
  // What reads as words is searched; instants and amounts are shown in another form than they are kept.
  const worded = useMemo(() => new Set(columns.filter(({ value }) => rows.some((row) => typeof value(row) === 'string')).map(({ id }) => id)), [columns, rows]);
  const definitions = useMemo(() => {
    const helper = createColumnHelper<typeof tableFeatureSet, { row: Row }>();
    return helper.columns(columns.map((column) => helper.accessor(({ row }) => column.value(row), {
      id: column.id, header: column.header, sortFn: (a, b) => compareValues(column.value(a.original.row), column.value(b.original.row)),
    })));
  }, [columns]);
  const table = useTable({
    features: tableFeatureSet, columns: definitions, data, globalFilterFn: 'includesString', state: { sorting, globalFilter: search, columnVisibility: visibility },
    onSortingChange: setSorting, onGlobalFilterChange: setSearch, onColumnVisibilityChange: setVisibility, getColumnCanGlobalFilter: ({ id }) => worded.has(id),
  });
  const shown = columns.filter(({ id }) => visibility[id] !== false);
  const tableRows = table.getRowModel().rows;
  if (state === 'loading') return <ListSkeleton label={`Loading ${label}`} />;
  if (state === 'failed') return <ErrorState onRetry={onRetry} />;
  if (rows.length === 0) return <>{empty}</>;
  const firstKey = tableRows[0] ? rowKey(tableRows[0].original.row) : null;
  const isActiveShown = tableRows.some(({ original }) => rowKey(original.row) === activeKey);
  return (
    <div>
      <TableTools label={label} search={search} onSearch={setSearch} columns={columns} visibility={visibility} onVisibility={setVisibility} count={tableRows.length} total={rows.length} exportOf={exportOf}>{tools}</TableTools>
      <div className="overflow-x-auto md:max-h-[78dvh] md:overflow-y-auto print:max-h-none print:overflow-visible">
        <table className="w-full border-collapse" aria-label={label}>
          <TableHead columns={shown} sorting={sorting} onSort={setSorting} />
          <tbody className="max-md:block">
            {tableRows.map(({ original: { row } }, at) => {
              const key = rowKey(row);
              return <BodyRow key={key} row={row} columns={shown} href={rowHref?.(row)} onOpen={(href) => router.push(href)} isBeyond={at >= onPhone} isActive={key === (isActiveShown ? activeKey : firstKey)} onActive={() => setActiveKey(key)} />;
            })}
          </tbody>
          {footer ? <tfoot className="max-md:block">{footer}</tfoot> : null}
        </table>
      </div>
      {tableRows.length > onPhone ? <div className="border-t border-rule p-3 md:hidden"><Button className="w-full" onClick={() => setOnPhone(onPhone + ROWS_ON_PHONE)}>{`Show more of ${tableRows.length}`}</Button></div> : null}
      {tableRows.length === 0 ? <p className="px-4 py-6 text-ink-3">Nothing matches “{search}”.</p> : null}
    </div>
  );
}
