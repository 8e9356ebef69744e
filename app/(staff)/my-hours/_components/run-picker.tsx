'use client';

import { useRouter } from 'next/navigation';
import { INPUT } from '@/components/ui/field';
import { PAY_RUN_WORDS } from '@/lib/payroll/pay-run-state';
import type { MyHours } from '@/lib/payroll/server/teacher-pay';

/** Earlier months and their statements. */
export function RunPicker({ runs, current }: { runs: MyHours['runs']; current: string }) {
  const router = useRouter();
  if (runs.length < 2) return null;
  return (
    <select aria-label="Which month" value={current} onChange={(event) => router.push(`/my-hours?run=${event.target.value}`)} className={`${INPUT} w-auto`}>
      {runs.map(({ payRunId, label, state }) => <option key={payRunId} value={payRunId}>{label} ({PAY_RUN_WORDS[state]})</option>)}
    </select>
  );
}
