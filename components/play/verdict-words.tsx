import { CircleCheck, CircleDot } from 'lucide-react';
import { readingsOf } from '@/lib/harmony/readings';
import type { KeyNumber } from '@/lib/harmony/note';
import type { Verdict } from '@/lib/harmony/verdict';

export type VerdictText = { headline: string; details: string[]; isGood: boolean };

/** What was heard, in words to act on. With seconds allowed, also whether it came in time. */
export function verdictText(verdict: Verdict, played: readonly KeyNumber[], time: { milliseconds: number | null; seconds: number | undefined } = { milliseconds: null, seconds: undefined }): VerdictText {
  const { milliseconds, seconds } = time;
  const isLate = verdict.isRight && seconds !== undefined && milliseconds !== null && milliseconds > seconds * 1000;
  if (isLate) return { headline: 'Right notes, too late.', details: [`${secondsWords(milliseconds)} to place; the rung allows ${seconds} s. Try it again.`], isGood: false };
  const placed = verdict.isRight && milliseconds !== null ? [`${secondsWords(milliseconds)} to place.`] : [];
  return { headline: verdict.headline, details: [...verdict.details, ...calledAlone(verdict, played), ...placed], isGood: verdict.isRight };
}

const secondsWords = (milliseconds: number): string => `${(milliseconds / 1000).toFixed(1)} s`;

/** Other notes altogether: what they would be called when nobody had asked for a chord. */
function calledAlone({ kind, soundsAs }: Verdict, played: readonly KeyNumber[]): string[] {
  const names = kind === 'foreign' && soundsAs === null ? readingsOf(played).slice(0, 2).map(({ name }) => name) : [];
  return names.length > 0 ? [`By itself this would be called ${names.join(' or ')}.`] : [];
}

/** Green with a tick when it counts, brass with a dot when it may be tried again. */
export function VerdictWords({ text: { headline, details, isGood }, name }: { text: VerdictText; name?: string }) {
  const Icon = isGood ? CircleCheck : CircleDot;
  return (
    <div className={`flex gap-2 rounded px-3 py-[10px] ${isGood ? 'bg-felt-wash text-felt' : 'bg-brass-wash text-brass'}`}>
      <Icon size={18} aria-hidden className="mt-[2px] shrink-0" />
      <p><b>{name ? `${name}: ` : ''}{headline}</b>{' '}{details.join(' ')}</p>
    </div>
  );
}
