'use client';

import { useRouter } from 'next/navigation';
import { useState, useTransition } from 'react';
import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { ConfirmDialog } from '@/components/ui/confirm';
import type { AbsenceEffect } from '@/lib/calendar/server/family-lessons';
import { askAbsenceEffect, sendAbsence } from '../actions';

/** "Can't come": the rule's verdict stands there before anything is sent. */
export function AbsenceButton({ seatId, what }: { seatId: string; what: string }) {
  const router = useRouter();
  const [effect, setEffect] = useState<AbsenceEffect | null>(null);
  const [message, setMessage] = useState<string>();
  const [asking, startAsk] = useTransition();
  const [sending, startSend] = useTransition();
  const ask = () => startAsk(async () => {
    const result = await askAbsenceEffect({ seatId }).catch(() => null);
    if (result?.ok) setEffect(result.data);
    else toast.error(result?.message ?? 'This did not reach the school. Press again.');
  });
  const send = () => startSend(async () => {
    const result = await sendAbsence({ seatId }).catch(() => null);
    if (!result?.ok) return setMessage(result?.message ?? 'This did not reach the school. Press again.');
    setEffect(null);
    toast.success('Thank you, the school knows.');
    router.refresh();
  });
  return (
    <>
      <Button pending={asking} onClick={ask}>Can’t come</Button>
      {effect ? <ConfirmDialog open onOpenChange={(open) => { if (!open) setEffect(null); }} title={`Can’t come: ${what}`} consequences={effect.sentences} confirmLabel="Tell the school" pending={sending} error={message} onConfirm={send} /> : null}
    </>
  );
}
