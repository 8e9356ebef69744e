'use client';

import { useState, useTransition } from 'react';
import { Button } from '@/components/ui/button';
import { ConfirmDialog } from '@/components/ui/confirm';
import { TextField } from '@/components/ui/inputs';
import { passOver } from '../../actions';

/** Going on without a teacher's answer, after its day and with a reason. */
export function PassOver({ payRunId, engagementId, name }: { payRunId: string; engagementId: string; name: string }) {
  const [isAsking, setIsAsking] = useState(false);
  const [reason, setReason] = useState('');
  const [error, setError] = useState<string>();
  const [pending, startTransition] = useTransition();
  const confirm = () => startTransition(async () => {
    const result = await passOver({ payRunId, engagementId, reason }).catch(() => null);
    if (result?.ok) return setIsAsking(false);
    setError(result ? (result.fields.reason?.[0] ?? result.message) : 'This did not reach the school. Try again.');
  });
  return (
    <>
      <Button onClick={() => setIsAsking(true)}>Go on without an answer</Button>
      <ConfirmDialog open={isAsking} onOpenChange={setIsAsking} title={`Go on without ${name}’s answer?`} consequences={['The run no longer waits for this teacher.', 'Your reason is kept with the run.']} confirmLabel="Go on" pending={pending} error={error} onConfirm={confirm}>
        <TextField label="Because" value={reason} onChange={(event) => setReason(event.target.value)} />
      </ConfirmDialog>
    </>
  );
}
