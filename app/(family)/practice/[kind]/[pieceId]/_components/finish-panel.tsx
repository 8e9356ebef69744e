'use client';

import { useRouter } from 'next/navigation';
import { useState, useTransition } from 'react';
import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import { formatDate, plural } from '@/lib/format';
import { FEELING_WORDS, type Feeling, type PlayedKey } from '@/lib/ladder/practice';
import type { Finished } from '@/lib/ladder/server/finish-practice';
import type { PracticePiece } from '@/lib/ladder/server/practice-today';
import { keepPractice } from '../../../actions';
import { HurtsDialog } from './hurts-dialog';

type FinishProps = { piece: PracticePiece; studentId: string; minutes: number; locale: string; played: readonly PlayedKey[]; triedCount: number; keyCount: number };
const FEELINGS = Object.entries(FEELING_WORDS) as [Feeling, string][];

/** How it ends: the minutes are kept, and how it felt, in one press. */
export function FinishPanel({ piece, studentId, minutes, locale, played, triedCount, keyCount }: FinishProps) {
  const router = useRouter();
  const [feeling, setFeeling] = useState<Feeling | null>(null);
  const [problem, setProblem] = useState<string>();
  const [hurts, setHurts] = useState(false);
  const [pending, startSend] = useTransition();
  const isReview = piece.kind === 'review';
  const keep = () => startSend(async () => {
    const result = await keepPractice({ studentId, kind: piece.kind, itemId: piece.id, minutes, how: 'timed', feeling, note: '', played: isReview ? played.map(({ chords }) => ({ chords: [...chords] })) : [] }).catch(() => null);
    if (!result?.ok) return setProblem(result?.message ?? 'This did not reach the school. Check your connection and press again; nothing is lost.');
    toast.success(doneWords(result.data, locale));
    router.push('/practice');
  });
  return (
    <section className="sheet grid gap-3 p-4" aria-label="Finish">
      <fieldset>
        <legend className="text-[14px] font-semibold">How did it feel? <span className="font-normal text-ink-3">(if you like)</span></legend>
        <div className="mt-1 flex gap-2">
          {FEELINGS.map(([value, label]) => (
            <label key={value} className="flex items-center gap-2 rounded border border-rule px-3 py-2 has-checked:border-ink has-checked:bg-wash tap">
              <input type="radio" name="feeling" value={value} checked={feeling === value} onChange={() => setFeeling(value)} className="size-[18px] accent-ink" />{label}
            </label>
          ))}
        </div>
      </fieldset>
      {isReview && triedCount < keyCount ? <p className="text-small text-ink-3">{`${triedCount} of ${plural(keyCount, 'key')} played. A key that is not played counts as not there yet.`}</p> : null}
      <FormError message={problem} />
      <div className="flex flex-wrap gap-2">
        <Button kind="primary" pending={pending} onClick={keep} className="max-md:flex-1">{`Done, keep ${plural(minutes, 'minute')}`}</Button>
        <Button kind="danger" onClick={() => setHurts(true)}>This hurts</Button>
      </div>
      {hurts ? <HurtsDialog studentId={studentId} minutes={minutes} onClose={() => setHurts(false)} /> : null}
    </section>
  );
}

function doneWords({ minutes, isGood, nextDueOn }: Finished, locale: string): string {
  if (isGood === null || nextDueOn === null) return `${plural(minutes, 'minute')} kept.`;
  return isGood ? `It sits. It comes back on ${formatDate(nextDueOn, locale, 'short')}.` : `Not quite there; that is what review is for. It comes back on ${formatDate(nextDueOn, locale, 'short')}.`;
}
