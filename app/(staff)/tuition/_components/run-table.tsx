'use client';

import { Chip, type ChipTone } from '@/components/ui/chip';
import { DataTable } from '@/components/ui/data-table';
import type { Column } from '@/components/ui/data-table-core';
import { Sheet } from '@/components/ui/sheet';
import { EmptyState } from '@/components/ui/states';
import { say, type MoneyWords } from '@/lib/explained';
import { formatDate } from '@/lib/format';
import type { RunRow } from '@/lib/tuition/server/tuition-run-screen';

const STATES: Record<RunRow['state'], { words: string; tone: ChipTone }> = {
  preview: { words: 'to look at', tone: 'wait' }, releasing: { words: 'being released', tone: 'info' }, released: { words: 'released', tone: 'ok' }, dropped: { words: 'dropped', tone: 'neutral' },
};
export const RunChip = ({ state }: { state: RunRow['state'] }) => <Chip tone={STATES[state].tone}>{STATES[state].words}</Chip>;

export function RunTable({ runs, words }: { runs: readonly RunRow[]; words: MoneyWords }) {
  const columns: Column<RunRow>[] = [
    { id: 'label', header: 'Run', isTitle: true, value: ({ label }) => label },
    { id: 'state', header: 'State', value: ({ state }) => STATES[state].words, cell: ({ state }) => <RunChip state={state} /> },
    { id: 'families', header: 'Families', align: 'right', value: ({ families }) => families },
    { id: 'held', header: 'Held back', align: 'right', value: ({ held }) => held, cell: ({ held }) => (held === 0 ? '—' : held) },
    { id: 'due', header: 'Due', value: ({ dueOn }) => dueOn, cell: ({ dueOn }) => formatDate(dueOn, words.locale) },
    { id: 'total', header: 'Total', align: 'right', value: ({ totalMinor }) => totalMinor, cell: ({ totalMinor }) => <b>{say(totalMinor, words)}</b> },
  ];
  return (
    <Sheet flush>
      <DataTable label="tuition runs" rows={runs} columns={columns} rowKey={({ runId }) => runId} rowHref={({ runId }) => `/tuition/${runId}`}
        empty={<EmptyState title="No tuition run yet">Work out the bills of a term or a month. Nothing is sent until you have looked at them and released them.</EmptyState>} />
    </Sheet>
  );
}
