import { Eye, EyeOff } from 'lucide-react';
import { GrandStave } from '@/components/stave/grand-stave';
import { Button } from '@/components/ui/button';
import type { ChordStyle } from '@/lib/harmony/chord-name';
import { askName, type Ask } from '@/lib/ladder/asks';

/** What is to be heard: in words for what is told, on the stave for what is played. */
export function AskedAnswer({ ask, chordStyle }: { ask: Ask; chordStyle: ChordStyle }) {
  if (ask.answer !== null) return <p className="my-5 rounded bg-wash px-4 py-3"><span className="eyebrow block">To be heard</span><span className="font-display text-h2">{ask.answer}</span></p>;
  return ask.shown.notes.length > 0 ? <GrandStave notes={ask.shown.notes.map(({ note }) => note)} label={askName(ask, chordStyle)} /> : null;
}

/** The chords of the turn in order; the one asked now is marked. */
export function ChordsInTurn({ asks, chordNo, chordStyle }: { asks: readonly Ask[]; chordNo: number; chordStyle: ChordStyle }) {
  return (
    <ol aria-label="Chords in turn" className="mt-2 flex flex-wrap gap-1">
      {asks.map((ask, at) => (
        <li key={at} aria-current={at === chordNo ? 'step' : undefined} className={`rounded border px-2 py-[2px] text-small font-semibold ${at === chordNo ? 'border-brass-fill bg-brass-wash text-brass' : at < chordNo ? 'border-rule bg-wash text-ink-3' : 'border-rule text-ink-2'}`}>
          {askName(ask, chordStyle).replace(' (no root)', '')}
        </li>
      ))}
    </ol>
  );
}

export const AnswerSwitch = ({ isShown, onSwitch }: { isShown: boolean; onSwitch: () => void }) => (
  <Button kind="quiet" icon={isShown ? <EyeOff size={16} aria-hidden /> : <Eye size={16} aria-hidden />} onClick={onSwitch}>{isShown ? 'Hide the answer' : 'Show the answer'}</Button>
);
