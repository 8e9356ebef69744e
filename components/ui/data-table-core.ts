import {
  columnFilteringFeature, columnVisibilityFeature, createFilteredRowModel, createSortedRowModel, filterFn_includesString, globalFilteringFeature, rowSortingFeature, tableFeatures,
} from '@tanstack/react-table';
import type { ReactNode } from 'react';

/** One column as a screen describes it: what it is called, what it sorts and searches by, how it looks. */
export type Column<Row> = {
  id: string;
  header: string;
  /** Sorted, searched and exported by this. */
  value: (row: Row) => string | number | null;
  cell?: (row: Row) => ReactNode;
  align?: 'left' | 'right';
  /** Not shown until the person picks it. */
  hidden?: boolean;
  /** The column that stands as the heading of a row, also on a phone. */
  isTitle?: boolean;
};

export const tableFeatureSet = tableFeatures({
  columnFilteringFeature, globalFilteringFeature, columnVisibilityFeature, rowSortingFeature,
  filteredRowModel: createFilteredRowModel(), sortedRowModel: createSortedRowModel(), filterFns: { includesString: filterFn_includesString },
});

/** Numbers by size, words by the reader's alphabet, nothing last. */
export function compareValues(a: string | number | null, b: string | number | null): number {
  if (a === null || b === null) return a === b ? 0 : a === null ? 1 : -1;
  if (typeof a === 'number' && typeof b === 'number') return a - b;
  return String(a).localeCompare(String(b), undefined, { numeric: true, sensitivity: 'base' });
}

/** Moves the focus between rows with the arrows, Home and End. */
export function moveRowFocus(event: React.KeyboardEvent<HTMLTableRowElement>): void {
  const rows = [...(event.currentTarget.closest('tbody')?.querySelectorAll<HTMLTableRowElement>('tr[tabindex]') ?? [])];
  const at = rows.indexOf(event.currentTarget);
  const target = { ArrowDown: at + 1, ArrowUp: at - 1, Home: 0, End: rows.length - 1 }[event.key];
  // The keys belong to a field that is being typed in, not to the table around it.
  if (target === undefined || at < 0 || (event.target instanceof HTMLElement && /^(INPUT|TEXTAREA|SELECT)$/.test(event.target.tagName))) return;
  event.preventDefault();
  rows[Math.max(0, Math.min(rows.length - 1, target))]?.focus();
}
