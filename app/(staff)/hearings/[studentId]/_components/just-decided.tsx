'use client';

import { Undo2 } from 'lucide-react';
import { useRouter } from 'next/navigation';
import { useEffect, useState, useTransition } from 'react';
import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import { OUTCOME_WORDS } from '@/lib/ladder/hearing';
import type { JustDecided as Decided } from '@/lib/ladder/server/hearing-screen';
import { undoLeftWords } from '@/lib/ladder/undo';
import { undo } from '../../actions';

const TICK_MILLISECONDS = 1000;

/** Counts down from what the school's clock said, whatever the browser's clock says. */
function useSecondsLeft(atFirst: number): number {
  const [left, setLeft] = useState(atFirst);
  useEffect(() => {
    const endsAt = performance.now() + atFirst * TICK_MILLISECONDS;
    const timer = setInterval(() => setLeft(Math.max(0, Math.ceil((endsAt - performance.now()) / TICK_MILLISECONDS))), TICK_MILLISECONDS);
    return () => clearInterval(timer);
  }, [atFirst]);
  return left;
}

/** For ten minutes after deciding: one press takes it back, and the hearing goes on with the same keys. */
export function JustDecided({ decided: { id, title, outcome, secondsLeft } }: { decided: Decided }) {
  const left = useSecondsLeft(secondsLeft);
  const router = useRouter();
  const [problem, setProblem] = useState<string>();
  const [isPending, startTransition] = useTransition();
  const press = () => startTransition(async () => {
    const result = await undo({ hearingId: id }).catch(() => null);
    if (!result?.ok) return setProblem(result?.message ?? 'This did not reach the school. Press again.');
    toast.success('Taken back. The hearing goes on with the same keys.');
    router.push(`/hearings/${result.data.studentId}?rung=${result.data.rungId}`);
  });
  if (left === 0) return null;
  return (
    <div className="sheet mb-4 flex flex-wrap items-center justify-between gap-x-4 gap-y-2 px-4 py-2">
      <p><b>{title}</b>{`: ${OUTCOME_WORDS[outcome]}.`} <span className="text-ink-3">{outcome === 'passed' ? 'The mail to the family waits as long as you can undo.' : 'You can still take it back.'}</span></p>
      <Button kind="plain" pending={isPending} icon={<Undo2 size={16} aria-hidden />} onClick={press}>{`Undo, ${undoLeftWords(left)}`}</Button>
      <FormError message={problem} />
    </div>
  );
}
