'use client';

import { useState } from 'react';
import { Chip, type ChipTone } from '@/components/ui/chip';
import { DataTable } from '@/components/ui/data-table';
import type { Column } from '@/components/ui/data-table-core';
import { Sheet } from '@/components/ui/sheet';
import { EmptyState } from '@/components/ui/states';
import { say } from '@/lib/explained';
import { BILL_WORDS } from '@/lib/tuition/bill-words';
import type { RunBill, RunDetail } from '@/lib/tuition/server/tuition-run-screen';
import { BillDrawer } from './bill-drawer';

const TONES: Record<RunBill['state'], ChipTone> = { planned: 'wait', held: 'neutral', problem: 'bad', released: 'ok', gone: 'neutral' };
const FILTERS = ['all', 'new', 'changed', 'gone', 'held'] as const;
type Filter = (typeof FILTERS)[number];
const FILTER_WORDS: Record<Filter, string> = { all: 'All', new: 'New', changed: 'Changed', gone: 'Gone', held: 'Held back' };
const fits = (bill: RunBill, filter: Filter) =>
  filter === 'all' || (filter === 'held' ? bill.state === 'held' || bill.state === 'problem' : bill.changeKind === filter && bill.state !== 'problem');

const whyOf = ({ problem, heldReason, changeText }: RunBill) => problem || (heldReason ? `Held: ${heldReason}` : changeText);

/** Every family's bill beside the last time, with the reason; a row opens the whole working. */
export function RunBills({ run, locale }: { run: RunDetail; locale: string }) {
  const [filter, setFilter] = useState<Filter>('all');
  const [openId, setOpenId] = useState<string | null>(null);
  const words = { currency: run.currency, locale };
  const columns: Column<RunBill>[] = [
    { id: 'family', header: 'Family', isTitle: true, value: ({ familyName }) => familyName, cell: (bill) => <button type="button" className="text-left font-semibold text-petrol hover:underline tap" onClick={() => setOpenId(bill.familyId)}>{bill.familyName}</button> },
    { id: 'why', header: 'Beside last time', value: whyOf, cell: (bill) => <span className={bill.problem ? 'text-brick' : 'text-ink-2'}>{whyOf(bill)}</span> },
    { id: 'last', header: 'Last tuition', align: 'right', value: ({ lastTotalMinor }) => lastTotalMinor, cell: ({ lastTotalMinor }) => (lastTotalMinor === null ? '—' : say(lastTotalMinor, words)) },
    { id: 'now', header: 'Now', align: 'right', value: ({ totalMinor }) => totalMinor, cell: ({ totalMinor }) => <b>{say(totalMinor, words)}</b> },
    { id: 'state', header: 'State', value: ({ state }) => BILL_WORDS[state], cell: ({ state }) => <Chip tone={TONES[state]}>{BILL_WORDS[state]}</Chip> },
  ];
  const rows = run.bills.filter((bill) => fits(bill, filter));
  return (
    <Sheet flush>
      <div role="group" aria-label="Show" className="flex flex-wrap gap-1 border-b border-rule px-3 py-2">
        {FILTERS.map((name) => (
          <button key={name} type="button" aria-pressed={filter === name} onClick={() => setFilter(name)} className="rounded px-3 py-[6px] text-small font-semibold text-ink-2 aria-pressed:bg-ink aria-pressed:text-white tap">
            {FILTER_WORDS[name]} {run.bills.filter((bill) => fits(bill, name)).length}
          </button>
        ))}
      </div>
      <DataTable label="bills of this run" rows={rows} columns={columns} rowKey={({ familyId }) => familyId} exportOf={run.mayExport ? { list: 'bills', rows: run.bills.length, runId: run.runId } : null} empty={<EmptyState title="Nothing here">{filter === 'all' ? 'No family has anything to charge in this period: either it is billed already, or no lessons are planned.' : 'No bill of this kind in the run.'}</EmptyState>} />
      <BillDrawer bill={run.bills.find(({ familyId }) => familyId === openId) ?? null} run={run} words={words} onClose={() => setOpenId(null)} />
    </Sheet>
  );
}
