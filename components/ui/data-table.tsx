'use client';

import { createColumnHelper, useTable, type SortingState } from '@tanstack/react-table';
import { useRouter } from 'next/navigation';
import { useMemo, useState, type ReactNode } from 'react';
import { compareValues, moveRowFocus, tableFeatureSet, type Column } from './data-table-core';
import { TableHead } from './data-table-head';
import { TableTools } from './data-table-tools';

type DataTableProps<Row> = {
  label: string;
  rows: readonly Row[];
  columns: readonly Column<Row>[];
  rowKey: (row: Row) => string;
  /** Where a row leads; the whole row can be pressed and opened with Enter. */
  rowHref?: (row: Row) => string;
  empty: ReactNode;
  initialSort?: { id: string; desc?: boolean };
  exportHref?: string;
  tools?: ReactNode;
  footer?: ReactNode;
};

/** A table that sorts, searches, hides columns, moves by keyboard, and becomes a list of cards on a phone. */
export function DataTable<Row>({ label, rows, columns, rowKey, rowHref, empty, initialSort, exportHref, tools, footer }: DataTableProps<Row>) {
  const router = useRouter();
  const [sorting, setSorting] = useState<SortingState>(initialSort ? [{ id: initialSort.id, desc: initialSort.desc ?? false }] : []);
  const [search, setSearch] = useState('');
  const [visibility, setVisibility] = useState<Record<string, boolean>>(() => Object.fromEntries(columns.filter(({ hidden }) => hidden).map(({ id }) => [id, false])));
  const data = useMemo(() => rows.map((row) => ({ row })), [rows]);
  const definitions = useMemo(() => {
    const helper = createColumnHelper<typeof tableFeatureSet, { row: Row }>();
    return helper.columns(columns.map((column) => helper.accessor(({ row }) => column.value(row), {
      id: column.id, header: column.header, sortFn: (a, b) => compareValues(column.value(a.original.row), column.value(b.original.row)),
    })));
  }, [columns]);
  const table = useTable({
    features: tableFeatureSet, columns: definitions, data, globalFilterFn: 'includesString', state: { sorting, globalFilter: search, columnVisibility: visibility },
    onSortingChange: setSorting, onGlobalFilterChange: setSearch, onColumnVisibilityChange: setVisibility, getColumnCanGlobalFilter: () => true,
  });
  const shown = columns.filter(({ id }) => visibility[id] !== false);
  const tableRows = table.getRowModel().rows;
  if (rows.length === 0) return <>{empty}</>;
  return (
    <div>
      <TableTools label={label} search={search} onSearch={setSearch} columns={columns} visibility={visibility} onVisibility={setVisibility} count={tableRows.length} total={rows.length} exportHref={exportHref}>{tools}</TableTools>
      <div className="overflow-x-auto">
        <table className="w-full border-collapse" aria-label={label}>
          <TableHead columns={shown} sorting={sorting} onSort={setSorting} />
          <tbody onKeyDown={moveRowFocus} className="max-md:block">
            {tableRows.map(({ original: { row } }) => (
              <BodyRow key={rowKey(row)} row={row} columns={shown} href={rowHref?.(row)} onOpen={(href) => router.push(href)} />
            ))}
          </tbody>
          {footer ? <tfoot className="max-md:block">{footer}</tfoot> : null}
        </table>
      </div>
      {tableRows.length === 0 ? <p className="px-4 py-6 text-ink-3">Nothing matches “{search}”.</p> : null}
    </div>
  );
}

type BodyRowProps<Row> = { row: Row; columns: readonly Column<Row>[]; href: string | undefined; onOpen: (href: string) => void };

function BodyRow<Row>({ row, columns, href, onOpen }: BodyRowProps<Row>) {
  const open = (event: React.SyntheticEvent) => {
    if (!href || (event.target as HTMLElement).closest('a, button, input, select, summary, label')) return;
    onOpen(href);
  };
  return (
    <tr tabIndex={0} onClick={open} onKeyDown={(event) => event.key === 'Enter' && open(event)} className={`border-b border-rule last:border-b-0 focus-visible:-outline-offset-2 max-md:block max-md:px-4 max-md:py-3 ${href ? 'cursor-pointer hover:bg-wash/60' : ''}`}>
      {columns.map((column) => {
        const content = column.cell ? column.cell(row) : column.value(row);
        const place = column.align === 'right' ? 'text-right num' : 'text-left';
        if (column.isTitle) return <th key={column.id} scope="row" className={`px-3 py-[10px] align-middle font-semibold max-md:block max-md:px-0 max-md:py-0 ${place}`}>{content}</th>;
        return (
          <td key={column.id} className={`px-3 py-[10px] align-middle max-md:flex max-md:justify-between max-md:gap-4 max-md:px-0 max-md:py-[3px] max-md:text-left ${place}`}>
            <span aria-hidden className="text-small text-ink-3 md:hidden">{column.header}</span>
            <span className="min-w-0 max-md:text-right">{content}</span>
          </td>
        );
      })}
    </tr>
  );
}
