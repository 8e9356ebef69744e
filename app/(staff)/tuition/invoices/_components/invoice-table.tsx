'use client';

import { ShareChip } from '@/components/tuition/share-chip';
import { DataTable } from '@/components/ui/data-table';
import type { Column } from '@/components/ui/data-table-core';
import { Sheet } from '@/components/ui/sheet';
import { EmptyState } from '@/components/ui/states';
import { say } from '@/lib/explained';
import { formatDate } from '@/lib/format';
import { SHARE_WORDS } from '@/lib/tuition/share-state';
import type { InvoiceRow } from '@/lib/tuition/server/staff-invoice';

export function InvoiceTable({ rows, locale, toTake }: { rows: readonly InvoiceRow[]; locale: string; toTake: number | null }) {
  const columns: Column<InvoiceRow>[] = [
    { id: 'number', header: 'Number', isTitle: true, value: ({ documentNo }) => documentNo, cell: ({ documentNo }) => <span className="num">{documentNo}</span> },
    { id: 'family', header: 'Family', value: ({ familyName }) => familyName },
    { id: 'for', header: 'For', value: ({ label }) => label },
    { id: 'issued', header: 'Issued', value: ({ issuedOn }) => issuedOn, cell: ({ issuedOn }) => formatDate(issuedOn, locale) },
    { id: 'due', header: 'Due', value: ({ dueOn }) => dueOn, cell: ({ dueOn }) => formatDate(dueOn, locale) },
    { id: 'total', header: 'Total', align: 'right', value: ({ totalMinor }) => totalMinor, cell: ({ totalMinor, currency }) => say(totalMinor, { currency, locale }) },
    { id: 'open', header: 'Open', align: 'right', value: ({ openMinor }) => openMinor, cell: ({ openMinor, currency }) => (openMinor === 0 ? '—' : <b>{say(openMinor, { currency, locale })}</b>) },
    { id: 'state', header: 'State', value: ({ state }) => SHARE_WORDS[state], cell: ({ state }) => <ShareChip state={state} /> },
  ];
  return (
    <Sheet flush>
      <DataTable label="invoices" rows={rows} columns={columns} rowKey={({ invoiceId }) => invoiceId} rowHref={({ invoiceId }) => `/tuition/invoices/${invoiceId}`} initialSort={{ id: 'number', desc: true }} exportOf={toTake === null ? null : { list: 'invoices', rows: toTake }}
        empty={<EmptyState title="No invoices yet">They appear here when a tuition run is released.</EmptyState>} />
    </Sheet>
  );
}
