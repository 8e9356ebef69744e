'use client';

import { useRouter } from 'next/navigation';
import { useState, useTransition } from 'react';
import { Button } from '@/components/ui/button';
import { ConfirmDialog } from '@/components/ui/confirm';
import { plural } from '@/lib/format';
import type { ImportDetail } from '@/lib/imports/server/import-screen';
import { bringIn } from '../../actions';

/** Says once more in figures what will be written, and asks once. */
export function BringInButton({ detail }: { detail: ImportDetail }) {
  const router = useRouter();
  const [open, setOpen] = useState(false);
  const [error, setError] = useState<string>();
  const [pending, startTransition] = useTransition();
  const { newCounts, lessonCount, control, batchId } = detail;
  const total = newCounts.reduce((sum, { count }) => sum + count, 0);
  const leftOut = control?.sheets.reduce((sum, { problems }) => sum + problems, 0) ?? 0;
  const start = () => startTransition(async () => {
    const result = await bringIn({ batchId }).catch(() => null);
    if (!result?.ok) return setError(Object.values(result?.fields ?? {})[0]?.[0] ?? result?.message ?? 'This did not reach the school. Press again.');
    setOpen(false);
    router.refresh();
  });
  if (total === 0) return <p className="rounded bg-wash px-3 py-2 text-ink-2">There is no new row to bring in. Put the rows that are left out right in the workbook and choose it again; what the school has already stays as it is.</p>;
  return (
    <>
      <Button kind="primary" onClick={() => { setError(undefined); setOpen(true); }}>Bring in {plural(total, 'row')}</Button>
      <ConfirmDialog open={open} onOpenChange={setOpen} title="Bring this workbook in?" confirmLabel={`Bring in ${plural(total, 'row')}`} pending={pending} error={error} onConfirm={start}
        consequences={[
          `New in the school: ${newCounts.map(({ count, word }) => `${count} ${word}`).join(', ')}.`,
          ...(lessonCount > 0 ? [`${plural(lessonCount, 'lesson')} will stand in the calendar.`] : []),
          leftOut > 0 ? `${plural(leftOut, 'row is', 'rows are')} left out; the list says why.` : 'No row is left out.',
          'All of it or nothing is written. No mail is sent, nobody gets an account.', 'It can be undone until somebody builds on it.',
        ]} />
    </>
  );
}
