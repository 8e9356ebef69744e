'use client';

import { CircleCheck, CircleDot, TriangleAlert } from 'lucide-react';
import { chordName, type ChordStyle } from '@/lib/harmony/chord-name';
import { chordOf } from '@/lib/harmony/chord';
import { readingsOf } from '@/lib/harmony/readings';
import type { Verdict } from '@/lib/harmony/verdict';
import type { Hearing, Told } from './use-hearing';

const secondsWords = (milliseconds: number): string => `${(milliseconds / 1000).toFixed(1)} s`;

/** What was heard last, in words to act on; read out when it changes. */
export function VerdictStrip({ hearing, seconds, chordStyle }: { hearing: Hearing; seconds: number | undefined; chordStyle: ChordStyle }) {
  const { told, problem, asks } = hearing;
  return (
    <div aria-live="polite" className="mt-3 min-h-[46px]">
      {problem ? <p className="flex gap-2 rounded bg-brick-wash px-3 py-[10px] text-brick"><TriangleAlert size={18} aria-hidden className="mt-[2px] shrink-0" />{problem}</p> : null}
      {told && !problem ? <VerdictWords told={told} seconds={seconds} chordStyle={chordStyle} isNamed={asks.length > 1} /> : null}
    </div>
  );
}

function VerdictWords({ told, seconds, chordStyle, isNamed }: { told: Told; seconds: number | undefined; chordStyle: ChordStyle; isNamed: boolean }) {
  const { headline, details, isGood } = wordsFor(told, seconds);
  const Icon = isGood ? CircleCheck : CircleDot;
  return (
    <div className={`flex gap-2 rounded px-3 py-[10px] ${isGood ? 'bg-felt-wash text-felt' : 'bg-brass-wash text-brass'}`}>
      <Icon size={18} aria-hidden className="mt-[2px] shrink-0" />
      <p><b>{isNamed ? `${chordName(chordOf(told.name), chordStyle)}: ` : ''}{headline}</b>{' '}{details.join(' ')}</p>
    </div>
  );
}

/** Other notes altogether: what they would be called when nobody had asked for a chord. */
function calledAlone({ kind, soundsAs }: Verdict, played: Told['played']): string[] {
  const names = kind === 'foreign' && soundsAs === null ? readingsOf(played).slice(0, 2).map(({ name }) => name) : [];
  return names.length > 0 ? [`By itself this would be called ${names.join(' or ')}.`] : [];
}

function wordsFor({ verdict, played, byEar, milliseconds }: Told, seconds: number | undefined): { headline: string; details: string[]; isGood: boolean } {
  if (!verdict) return byEar === 'right' ? { headline: 'Right, heard by ear.', details: [], isGood: true } : { headline: 'Not right yet, heard by ear.', details: ['It can be tried again.'], isGood: false };
  const isLate = verdict.isRight && seconds !== undefined && milliseconds !== null && milliseconds > seconds * 1000;
  if (isLate) return { headline: 'Right notes, too late.', details: [`${secondsWords(milliseconds)} to place; the rung allows ${seconds} s. Try it again.`], isGood: false };
  const placed = verdict.isRight && milliseconds !== null ? [`${secondsWords(milliseconds)} to place.`] : [];
  return { headline: verdict.headline, details: [...verdict.details, ...calledAlone(verdict, played), ...placed], isGood: verdict.isRight };
}
