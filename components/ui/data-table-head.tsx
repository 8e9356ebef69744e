'use client';

import { ArrowDown, ArrowUp } from 'lucide-react';
import type { SortingState } from '@tanstack/react-table';
import type { Column } from './data-table-core';

type TableHeadProps<Row> = { columns: readonly Column<Row>[]; sorting: SortingState; onSort: (sorting: SortingState) => void };

export function TableHead<Row>({ columns, sorting, onSort }: TableHeadProps<Row>) {
  const current = sorting[0];
  return (
    <thead className="sticky top-0 z-10 bg-sheet max-md:sr-only">
      <tr className="border-b border-rule-strong">
        {columns.map(({ id, header, align }) => {
          const isSorted = current?.id === id;
          const direction = isSorted ? (current.desc ? 'descending' : 'ascending') : undefined;
          if (header === '') return <th key={id} scope="col"><span className="sr-only">Actions</span></th>;
          return (
            <th key={id} scope="col" aria-sort={direction ?? 'none'} className={`px-3 py-[9px] text-[12.5px] font-semibold text-ink-3 ${align === 'right' ? 'text-right' : 'text-left'}`}>
              <button type="button" onClick={() => onSort([{ id, desc: isSorted && !current.desc }])} className={`inline-flex items-center gap-1 hover:text-ink ${isSorted ? 'text-ink' : ''}`}>
                {header}
                {isSorted ? (current.desc ? <ArrowDown size={13} aria-hidden /> : <ArrowUp size={13} aria-hidden />) : null}
              </button>
            </th>
          );
        })}
      </tr>
    </thead>
  );
}
