'use client';

import { CircleCheck } from 'lucide-react';
import { useState, useTransition } from 'react';
import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import { Sheet } from '@/components/ui/sheet';
import { say, type MoneyWords } from '@/lib/explained';
import type { TeacherPay } from '@/lib/payroll/server/teacher-pay';
import { agree } from '../actions';
import { AskForm } from './ask-form';

/** One press to agree; or a question about something that is missing. */
export function Agree({ pay, words }: { pay: TeacherPay; words: MoneyWords }) {
  const [error, setError] = useState<string>();
  const [isAsking, setIsAsking] = useState(false);
  const [pending, startTransition] = useTransition();
  if (!pay.mayAnswer) return null;
  const press = () => startTransition(async () => {
    const result = await agree({ payRunId: pay.payRunId, engagementId: pay.engagementId }).catch(() => null);
    setError(result ? (result.ok ? undefined : result.message) : 'This did not reach the school. Press again.');
  });
  return (
    <Sheet className="no-print">
      {pay.check === 'agreed'
        ? <p className="flex items-center gap-2 font-semibold text-felt"><CircleCheck size={20} aria-hidden />You have agreed.</p>
        : <Button kind="primary" pending={pending} disabled={pay.check === 'queried'} onClick={press} className="w-full py-[13px]">I agree to {say(pay.totals.grossMinor + pay.totals.reimbursementMinor, words)}</Button>}
      {pay.check === 'queried' ? <p className="mt-2 text-small text-brass">Your question waits for its answer; you can agree after that.</p> : null}
      <FormError message={error} />
      {isAsking
        ? <div className="mt-4"><AskForm pay={pay} line={null} onClose={() => setIsAsking(false)} /></div>
        : <Button kind="quiet" className="mt-2" onClick={() => setIsAsking(true)}>Something is missing</Button>}
    </Sheet>
  );
}
