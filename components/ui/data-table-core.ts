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
export function compareValues(a: unknown, b: unknown): number {
  if (a === null || b === null) return a === b ? 0 : a === null ? 1 : -1;
  if (typeof a === 'number' && typeof b === 'number') return a - b;
  return String(a).localeCompare(String(b), undefined, { numeric: true, sensitivity: 'base' });
}

/** Moves the focus between rows with the arrows, Home and End. */
export function moveRowFocus(event: React.KeyboardEvent<HTMLTableSectionElement>): void {
  const rows = [...event.currentTarget.querySelectorAll<HTMLTableRowElement>('tr[tabindex]')];
  const at = rows.findIndex((row) => row.contains(document.activeElement));
  const target = { ArrowDown: at + 1, ArrowUp: at - 1, Home: 0, End: rows.length - 1 }[event.key];
  if (target === undefined || at < 0) return;
  event.preventDefault();
  rows[Math.max(0, Math.min(rows.length - 1, target))]?.focus();
}
