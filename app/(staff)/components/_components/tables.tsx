'use client';

import { useState } from 'react';
import { Chip } from '@/components/ui/chip';
import { DataTable } from '@/components/ui/data-table';
import type { Column } from '@/components/ui/data-table-core';
import { SelectField } from '@/components/ui/inputs';
import { Sheet } from '@/components/ui/sheet';
import { EmptyState } from '@/components/ui/states';
import { formatMoney } from '@/lib/format';

type Row = { id: string; name: string; lessons: number; grossMinor: number; says: 'agreed' | 'asked' };
const ROWS: readonly Row[] = [
  { id: 'a', name: 'Greta Dahl', lessons: 38, grossMinor: 151_250, says: 'agreed' }, { id: 'b', name: 'Kwame Osei', lessons: 44, grossMinor: 145_600, says: 'agreed' },
  { id: 'c', name: 'Søren Quarles-Nørgaard van der Aldenhoven', lessons: 9, grossMinor: 61_050, says: 'asked' },
];
const COLUMNS: readonly Column<Row>[] = [
  { id: 'name', header: 'Teacher', isTitle: true, value: ({ name }) => name },
  { id: 'lessons', header: 'Lessons', align: 'right', value: ({ lessons }) => lessons },
  { id: 'gross', header: 'Gross', align: 'right', value: ({ grossMinor }) => grossMinor, cell: ({ grossMinor }) => formatMoney({ amountMinor: grossMinor, currency: 'EUR' }, 'en-IE') },
  { id: 'says', header: 'Teacher says', value: ({ says }) => says, cell: ({ says }) => <Chip tone={says === 'agreed' ? 'ok' : 'wait'}>{says === 'agreed' ? 'agreed' : 'asked about 10 Nov'}</Chip> },
];
const STATES = [{ value: 'rows', label: 'With rows' }, { value: 'empty', label: 'Empty' }, { value: 'loading', label: 'Loading' }, { value: 'failed', label: 'Failed' }];

export function Tables() {
  const [state, setState] = useState('rows');
  return (
    <Sheet title="A table" action={<SelectField label="State" options={STATES} value={state} onChange={(event) => setState(event.target.value)} />} flush>
      <DataTable label="example teachers" rows={state === 'empty' ? [] : ROWS} columns={COLUMNS} rowKey={({ id }) => id} rowHref={() => '/components'} initialSort={{ id: 'name' }} onRetry={() => setState('rows')}
        state={state === 'loading' || state === 'failed' ? state : undefined} empty={<EmptyState title="Nobody here">What to do next stands here.</EmptyState>} />
    </Sheet>
  );
}
