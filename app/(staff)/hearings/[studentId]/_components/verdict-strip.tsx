'use client';

import { TriangleAlert } from 'lucide-react';
import { VerdictWords, verdictText, type VerdictText } from '@/components/play/verdict-words';
import { chordName, type ChordStyle } from '@/lib/harmony/chord-name';
import { chordOf } from '@/lib/harmony/chord';
import type { Hearing, Told } from './use-hearing';

/** What was heard last, in words to act on; read out when it changes. */
export function VerdictStrip({ hearing, seconds, chordStyle }: { hearing: Hearing; seconds: number | undefined; chordStyle: ChordStyle }) {
  const { told, problem, asks } = hearing;
  return (
    <div aria-live="polite" className="mt-3 min-h-[46px]">
      {problem ? <p className="flex gap-2 rounded bg-brick-wash px-3 py-[10px] text-brick"><TriangleAlert size={18} aria-hidden className="mt-[2px] shrink-0" />{problem}</p> : null}
      {told && !problem ? <VerdictWords text={wordsFor(told, seconds)} {...(asks.length > 1 ? { name: chordName(chordOf(told.name), chordStyle) } : {})} /> : null}
    </div>
  );
}

function wordsFor({ verdict, played, byEar, milliseconds }: Told, seconds: number | undefined): VerdictText {
  if (verdict) return verdictText(verdict, played, { milliseconds, seconds });
  return byEar === 'right' ? { headline: 'Right, heard by ear.', details: [], isGood: true } : { headline: 'Not right yet, heard by ear.', details: ['It can be tried again.'], isGood: false };
}
