'use client';

import { DataTable } from '@/components/ui/data-table';
import type { Column } from '@/components/ui/data-table-core';
import { Sheet } from '@/components/ui/sheet';
import { EmptyState } from '@/components/ui/states';
import { say } from '@/lib/explained';
import { formatDate } from '@/lib/format';
import { METHOD_WORDS } from '@/lib/tuition/schema';
import type { PaymentListRow } from '@/lib/tuition/server/staff-invoice';

export function PaymentTable({ rows, locale, toTake }: { rows: readonly PaymentListRow[]; locale: string; toTake: number | null }) {
  const columns: Column<PaymentListRow>[] = [
    { id: 'receipt', header: 'Receipt', isTitle: true, value: ({ receiptNo }) => receiptNo, cell: ({ receiptNo }) => <span className="num">{receiptNo}</span> },
    { id: 'day', header: 'Received', value: ({ receivedOn }) => receivedOn, cell: ({ receivedOn }) => formatDate(receivedOn, locale, 'short') },
    { id: 'payer', header: 'Payer', value: ({ payerName }) => payerName },
    { id: 'family', header: 'Family', value: ({ familyName }) => familyName },
    { id: 'method', header: 'By', value: ({ method }) => METHOD_WORDS[method] },
    { id: 'credit', header: 'Kept as credit', align: 'right', value: ({ creditMinor }) => creditMinor, cell: ({ creditMinor, currency }) => (creditMinor === 0 ? '—' : say(creditMinor, { currency, locale })) },
    { id: 'amount', header: 'Amount', align: 'right', value: ({ amountMinor }) => amountMinor, cell: ({ amountMinor, currency }) => <b>{say(amountMinor, { currency, locale })}</b> },
    { id: 'note', header: 'Note', value: ({ note }) => note, hidden: true },
  ];
  return (
    <Sheet flush>
      <DataTable label="payments" rows={rows} columns={columns} rowKey={({ id }) => id} exportOf={toTake === null ? null : { list: 'payments', rows: toTake }}
        empty={<EmptyState title="No payments yet">Card payments appear by themselves; take cash, transfers and cheques with the button above.</EmptyState>} />
    </Sheet>
  );
}
