'use client';

import { useRouter } from 'next/navigation';
import { useState, useTransition } from 'react';
import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { ConfirmDialog } from '@/components/ui/confirm';
import { Sheet } from '@/components/ui/sheet';
import { plural } from '@/lib/format';
import type { Obstacle } from '@/lib/imports/server/undo-import';
import { takeBack } from '../../actions';

/** Undo, while nobody has built on what came in; otherwise the rows that stand in its way. */
export function UndoSheet({ batchId, fileName, obstacles }: { batchId: string; fileName: string; obstacles: readonly Obstacle[] }) {
  const router = useRouter();
  const [open, setOpen] = useState(false);
  const [error, setError] = useState<string>();
  const [pending, startTransition] = useTransition();
  const undo = () => startTransition(async () => {
    const result = await takeBack({ batchId }).catch(() => null);
    if (!result?.ok) return setError(result?.message ?? 'This did not reach the school. Press again.');
    setOpen(false);
    toast.success('The import has been undone.');
    router.refresh();
  });
  return (
    <Sheet eyebrow="Undo">
      {obstacles.length === 0 ? (
        <>
          <p className="mb-3 text-ink-2">Nobody has built on these rows yet, so they can be taken back whole.</p>
          <Button kind="danger" onClick={() => setOpen(true)}>Undo this import</Button>
        </>
      ) : (
        <>
          <p className="mb-2 text-ink-2">It can no longer be undone: {plural(obstacles.length, 'row has', 'rows have')} been used since. What is wrong can be put right on its own page.</p>
          <details>
            <summary className="py-1 font-semibold text-petrol">Which rows</summary>
            <ul className="mt-1 flex max-h-80 flex-col gap-1 overflow-y-auto text-small">
              {obstacles.map(({ sheet, rowNo, title, what }) => <li key={`${sheet}${rowNo}${what}`}><span className="font-semibold">{title}</span> {what} <span className="text-ink-3">({sheet}, row {rowNo})</span></li>)}
            </ul>
          </details>
        </>
      )}
      <ConfirmDialog open={open} onOpenChange={setOpen} title={`Undo ${fileName}?`} kind="danger" confirmLabel="Undo the import" pending={pending} error={error} onConfirm={undo}
        consequences={['Every person, room, family, enrolment and lesson that came with it goes.', 'The workbook can be brought in again.', 'No mail is sent.']} />
    </Sheet>
  );
}
