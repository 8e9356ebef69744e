'use client';

import { useRouter } from 'next/navigation';
import { useState, useTransition } from 'react';
import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { FormError } from '@/components/ui/form-error';
import { TextField } from '@/components/ui/inputs';
import { HURT_ADVICE } from '@/lib/ladder/hurt-advice';
import { sayItHurts } from '../../../actions';

/** The advice stands there first; whether the teacher is told is one more press, never a condition for stopping. */
export function HurtsDialog({ studentId, minutes, onClose }: { studentId: string; minutes: number; onClose: () => void }) {
  const router = useRouter();
  const [where, setWhere] = useState('');
  const [problem, setProblem] = useState<string>();
  const [pending, startSend] = useTransition();
  const tell = () => startSend(async () => {
    const result = await sayItHurts({ studentId, minutes, where }).catch(() => null);
    if (!result?.ok) return setProblem(result?.message ?? 'This did not reach the school. Stop playing all the same, and press again.');
    toast.success('Your teacher knows. Rest well.');
    router.push('/practice');
  });
  return (
    <Dialog open onOpenChange={(open) => { if (!open) onClose(); }} title="Stop playing">
      <ul className="grid list-disc gap-1 pl-5">{HURT_ADVICE.map((line) => <li key={line}>{line}</li>)}</ul>
      <div className="mt-4 grid gap-3">
        <TextField label="Where does it hurt?" optional value={where} maxLength={200} onChange={(event) => setWhere(event.target.value)} />
        <FormError message={problem} />
        <div className="flex flex-wrap gap-2">
          <Button kind="primary" pending={pending} onClick={tell}>Stop, and tell my teacher</Button>
          <Button kind="quiet" onClick={() => router.push('/practice')}>Stop without telling</Button>
        </div>
        <p className="text-small text-ink-3">Your teacher is told; for a student under age, so are the guardians who follow the progress.</p>
      </div>
    </Dialog>
  );
}
