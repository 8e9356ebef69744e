'use client';

import { useRouter } from 'next/navigation';
import { useState, useTransition } from 'react';
import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { FormError } from '@/components/ui/form-error';
import { SelectField } from '@/components/ui/inputs';
import { takeRungOut } from '../../../actions';

/** Leaves a rung out of this edition; where its passes go is asked first. */
export function LeaveOut({ rungId, code, others }: { rungId: string; code: string; others: readonly { id: string; label: string }[] }) {
  const router = useRouter();
  const [open, setOpen] = useState(false);
  const [into, setInto] = useState(others[0]?.id ?? '');
  const [problem, setProblem] = useState<string>();
  const [pending, startSend] = useTransition();
  const send = () => startSend(async () => {
    const result = await takeRungOut({ rungId, intoRungId: into }).catch(() => null);
    if (!result?.ok) return setProblem(result?.message ?? 'This did not reach the school. Press again; nothing is lost.');
    toast.success(`${code} is left out.`);
    router.push('/ladder/edition');
  });
  return (
    <>
      <Button kind="danger" onClick={() => setOpen(true)}>Leave out</Button>
      <Dialog open={open} onOpenChange={setOpen} title={`Leave ${code} out`} description="Whoever passed it keeps that. In the new edition they are credited another rung.">
        <div className="grid gap-4">
          <SelectField label="Credited instead" options={others.map(({ id, label }) => ({ value: id, label }))} value={into} onChange={(event) => setInto(event.target.value)} />
          <FormError message={problem} />
          <Button kind="danger" pending={pending} onClick={send}>Leave it out</Button>
        </div>
      </Dialog>
    </>
  );
}
