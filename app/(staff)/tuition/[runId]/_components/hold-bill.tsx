'use client';

import { useState, useTransition } from 'react';
import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import { TextField } from '@/components/ui/inputs';
import type { RunBill } from '@/lib/tuition/server/tuition-run-screen';
import { hold, unhold } from '../../actions';

/** Keeps a bill back from the run, with a reason, or lets it go with it again. */
export function HoldBill({ runId, bill }: { runId: string; bill: RunBill }) {
  const [reason, setReason] = useState('');
  const [error, setError] = useState<{ message: string; field?: string }>();
  const [pending, startTransition] = useTransition();
  const isHeld = bill.state === 'held';
  const press = () => startTransition(async () => {
    const result = await (isHeld ? unhold({ runId, familyId: bill.familyId }) : hold({ runId, familyId: bill.familyId, reason })).catch(() => null);
    if (result?.ok) return setError(undefined);
    setError({ message: result?.message ?? 'This did not reach the school. Try again.', field: result?.fields.reason?.[0] });
  });
  return (
    <div className="mt-6 flex flex-col gap-3 border-t border-rule pt-4">
      {isHeld ? <p className="text-ink-2">Held back: {bill.heldReason}</p> : <TextField label="Hold this bill back because" value={reason} onChange={(event) => setReason(event.target.value)} error={error?.field} />}
      {error && !error.field ? <FormError message={error.message} /> : null}
      <Button pending={pending} onClick={press} className="self-start">{isHeld ? 'Let it go with the run' : 'Hold it back'}</Button>
    </div>
  );
}
