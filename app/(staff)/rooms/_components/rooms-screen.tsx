'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Chip } from '@/components/ui/chip';
import { DataTable } from '@/components/ui/data-table';
import type { Column } from '@/components/ui/data-table-core';
import { Dialog } from '@/components/ui/dialog';
import { Sheet } from '@/components/ui/sheet';
import { EmptyState } from '@/components/ui/states';
import type { Feature, Room, Site } from '@/db/rooms';
import { RoomForm } from './room-form';

type RoomsScreenProps = { rooms: readonly Room[]; sites: readonly Site[]; features: readonly Feature[] };

export function RoomsScreen({ rooms, sites, features }: RoomsScreenProps) {
  const [open, setOpen] = useState(false);
  const labelOf = (code: string) => features.find((feature) => feature.code === code)?.label ?? code;
  const columns: Column<Room>[] = [
    { id: 'name', header: 'Room', isTitle: true, value: ({ name }) => name },
    { id: 'site', header: 'Site', value: ({ siteName }) => siteName },
    { id: 'limit', header: 'People', align: 'right', value: ({ personLimit }) => personLimit },
    { id: 'turnover', header: 'Turnover', align: 'right', value: ({ turnoverMin }) => turnoverMin, cell: ({ turnoverMin }) => (turnoverMin === 0 ? '–' : `${turnoverMin} min`) },
    { id: 'has', header: 'Has', value: (room) => room.features.map(labelOf).join(', '), cell: (room) => <span className="flex flex-wrap gap-1 max-md:justify-end">{room.features.map((code) => <Chip key={code}>{labelOf(code)}</Chip>)}</span> },
  ];
  const add = <Button kind="primary" onClick={() => setOpen(true)}>Add a room</Button>;
  return (
    <>
      <Sheet flush>
        <DataTable label="rooms" rows={rooms} columns={columns} rowKey={({ id }) => id} rowHref={({ id }) => `/calendar?room=${id}`} tools={add}
          empty={<EmptyState title="No rooms yet" action={add}>Lessons need a place. Add the rooms with what stands in them, or bring everything in with the importer.</EmptyState>} />
      </Sheet>
      <Dialog open={open} onOpenChange={setOpen} title="Add a room"><RoomForm sites={sites} features={features} onDone={() => setOpen(false)} /></Dialog>
    </>
  );
}
