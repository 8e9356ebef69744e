'use client';

import { useRouter } from 'next/navigation';
import { useState, useTransition } from 'react';
import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { ConfirmDialog } from '@/components/ui/confirm';
import { plural } from '@/lib/format';
import { publish } from '../../../actions';

type Seen = { climbers: number; gaining: number; heldUp: number; rechecks: number };

/** Asked once, with what will happen. */
export function PublishButton({ label, seen }: { label: string; seen: Seen }) {
  const router = useRouter();
  const [open, setOpen] = useState(false);
  const [problem, setProblem] = useState<string>();
  const [pending, startSend] = useTransition();
  const send = () => startSend(async () => {
    const result = await publish({ climbers: seen.climbers }).catch(() => null);
    if (!result?.ok) return setProblem(result?.message ?? 'This did not reach the school. Press again; nothing is lost.');
    toast.success(`${label} is live. ${plural(result.data.moved, 'student')} moved over.`);
    router.push('/ladder');
  });
  const consequences = [
    `${plural(seen.climbers, 'student moves', 'students move')} to it today; reports already written keep the old words.`,
    `${plural(seen.gaining, 'gains', 'gain')} rungs by credit; ${plural(seen.heldUp, 'meets', 'meet')} a new rung; ${plural(seen.rechecks, 'pass is', 'passes are')} heard once more.`,
    'It cannot be taken back; the edition after it can change everything again.',
  ];
  return (
    <>
      <Button kind="primary" onClick={() => setOpen(true)}>Publish from today</Button>
      <ConfirmDialog open={open} onOpenChange={setOpen} title={`Publish the ${label.toLowerCase()}`} consequences={consequences} confirmLabel="Publish" pending={pending} error={problem} onConfirm={send} />
    </>
  );
}
