'use client';

import { RunStateChip } from '@/components/payroll/run-state-chip';
import { DataTable } from '@/components/ui/data-table';
import type { Column } from '@/components/ui/data-table-core';
import { Sheet } from '@/components/ui/sheet';
import { EmptyState } from '@/components/ui/states';
import { say } from '@/lib/explained';
import { PAY_RUN_WORDS } from '@/lib/payroll/pay-run-state';
import type { PayRunRow } from '@/lib/payroll/server/pay-run-screen';

export function RunTable({ runs, locale }: { runs: readonly PayRunRow[]; locale: string }) {
  const columns: Column<PayRunRow>[] = [
    { id: 'label', header: 'Pay run', isTitle: true, value: ({ label }) => label },
    { id: 'state', header: 'State', value: ({ state }) => PAY_RUN_WORDS[state], cell: ({ state }) => <RunStateChip state={state} /> },
    { id: 'teachers', header: 'Teachers', align: 'right', value: ({ teachers }) => teachers },
    { id: 'open', header: 'To put right', align: 'right', value: ({ problems, openQueries }) => problems + openQueries, cell: ({ problems, openQueries }) => (problems + openQueries === 0 ? '—' : <b className="text-brick">{problems + openQueries}</b>) },
    { id: 'gross', header: 'Gross', align: 'right', value: ({ grossMinor }) => grossMinor, cell: ({ grossMinor, currency }) => <b>{say(grossMinor, { currency, locale })}</b> },
  ];
  return (
    <Sheet flush>
      <DataTable label="pay runs" rows={runs} columns={columns} rowKey={({ payRunId }) => payRunId} rowHref={({ payRunId }) => `/payroll/${payRunId}`}
        empty={<EmptyState title="No pay run yet">Choose a month and build it: every marked lesson becomes a line that explains itself.</EmptyState>} />
    </Sheet>
  );
}
