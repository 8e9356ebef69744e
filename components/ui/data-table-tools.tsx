'use client';

import { Columns3 } from 'lucide-react';
import { Popover } from 'radix-ui';
import type { ReactNode } from 'react';
import type { ListOffer } from '@/lib/exports/lists';
import { buttonClass } from './button';
import type { Column } from './data-table-core';
import { ExportMenu } from './export-menu';
import { INPUT } from './field';

type TableToolsProps<Row> = {
  label: string; search: string; onSearch: (text: string) => void; columns: readonly Column<Row>[]; visibility: Record<string, boolean>;
  onVisibility: (visibility: Record<string, boolean>) => void; count: number; total: number; exportOf?: ListOffer | null; children?: ReactNode;
};

export function TableTools<Row>({ label, search, onSearch, columns, visibility, onVisibility, count, total, exportOf, children }: TableToolsProps<Row>) {
  return (
    <div className="no-print flex flex-wrap items-center gap-3 border-b border-rule px-3 py-3">
      <input type="search" aria-label={`Search in ${label}`} placeholder="Search in this list" value={search} onChange={(event) => onSearch(event.target.value)} className={`${INPUT} max-w-64 basis-48 flex-1`} />
      {children}
      <span className="num ml-auto text-small text-ink-3" aria-live="polite">{count === total ? total : `${count} of ${total}`}</span>
      <Popover.Root>
        <Popover.Trigger className={buttonClass('quiet', 'max-md:hidden')}><Columns3 size={16} aria-hidden />Columns</Popover.Trigger>
        <Popover.Portal>
          <Popover.Content align="end" sideOffset={6} className="appear z-50 flex flex-col gap-1 rounded border border-rule bg-sheet p-3 shadow-lg">
            {columns.filter(({ isTitle }) => !isTitle).map(({ id, header }) => (
              <label key={id} className="flex items-center gap-2 py-1">
                <input type="checkbox" className="size-4 accent-ink" checked={visibility[id] !== false} onChange={(event) => onVisibility({ ...visibility, [id]: event.target.checked })} />
                {header}
              </label>
            ))}
          </Popover.Content>
        </Popover.Portal>
      </Popover.Root>
      {exportOf ? <ExportMenu offer={exportOf} /> : null}
    </div>
  );
}
