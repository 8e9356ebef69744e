'use client';

import { Eye, EyeOff, SkipForward } from 'lucide-react';
import { useState } from 'react';
import { GrandStave } from '@/components/stave/grand-stave';
import { Button } from '@/components/ui/button';
import { Checkbox } from '@/components/ui/inputs';
import type { ChordStyle } from '@/lib/harmony/chord-name';
import { askDegrees, askName, type Ask } from '@/lib/ladder/asks';
import { isSpoken } from '@/lib/ladder/play-spec';
import type { HearingScreen } from '@/lib/ladder/server/hearing-screen';
import { EarButtons } from './ear-buttons';
import { PlayArea } from './play-area';
import type { Hearing } from './use-hearing';
import { VerdictStrip } from './verdict-strip';

type AskPanelProps = { hearing: Hearing; rung: NonNullable<HearingScreen['rung']>; chordStyle: ChordStyle; goesOn: boolean; onGoesOn: (goesOn: boolean) => void };

/** What is asked now, how it is played, and what was heard. */
export function AskPanel({ hearing, rung, chordStyle, goesOn, onGoesOn }: AskPanelProps) {
  const [isShown, setIsShown] = useState(true);
  const { ask, asks, chordNo } = hearing;
  if (!ask) return null;
  const spoken = isSpoken(rung.spec.how);
  return (
    <section className="sheet min-w-0 p-4 md:px-5 md:py-[18px]" aria-label="Asked now">
      <Heading ask={ask} rung={rung} chordStyle={chordStyle} isShown={isShown} />
      {asks.length > 1 ? <Turn asks={asks} chordNo={chordNo} chordStyle={chordStyle} /> : null}
      {isShown ? <Answer ask={ask} chordStyle={chordStyle} /> : null}
      {spoken ? null : <PlayArea hearing={hearing} ask={ask} isShown={isShown} />}
      <VerdictStrip hearing={hearing} seconds={rung.criteria.seconds} chordStyle={chordStyle} />
      {spoken ? <EarButtons hearing={hearing} label="Was it right?" /> : null}
      <div className="mt-4 flex flex-wrap items-center gap-x-4 gap-y-2 border-t border-rule pt-3">
        <Button icon={<SkipForward size={16} aria-hidden />} onClick={hearing.next}>Next key</Button>
        <AnswerSwitch isShown={isShown} onSwitch={() => setIsShown(!isShown)} />
        <Checkbox label="Go on by itself" checked={goesOn} onChange={(event) => onGoesOn(event.target.checked)} />
        {spoken ? null : <EarButtons hearing={hearing} label="No MIDI here? By ear:" isSmall />}
      </div>
    </section>
  );
}

/** What is to be heard: in words for what is told, on the stave for what is played. */
function Answer({ ask, chordStyle }: { ask: Ask; chordStyle: ChordStyle }) {
  if (ask.answer !== null) return <p className="my-5 rounded bg-wash px-4 py-3"><span className="eyebrow block">To be heard</span><span className="font-display text-h2">{ask.answer}</span></p>;
  return ask.shown.notes.length > 0 ? <GrandStave notes={ask.shown.notes.map(({ note }) => note)} label={askName(ask, chordStyle)} /> : null;
}

const AnswerSwitch = ({ isShown, onSwitch }: { isShown: boolean; onSwitch: () => void }) => (
  <Button kind="quiet" icon={isShown ? <EyeOff size={16} aria-hidden /> : <Eye size={16} aria-hidden />} onClick={onSwitch}>{isShown ? 'Hide the answer' : 'Show the answer'}</Button>
);

function Heading({ ask, rung, chordStyle, isShown }: { ask: Ask; rung: AskPanelProps['rung']; chordStyle: ChordStyle; isShown: boolean }) {
  const degrees = askDegrees(ask);
  const title = rung.title.charAt(0).toLowerCase() + rung.title.slice(1);
  return (
    <div className="flex flex-wrap items-baseline gap-x-3 gap-y-1">
      <h2 className="text-[30px]">{askName(ask, chordStyle)}</h2>
      <p className="text-ink-3">{degrees && isShown ? `${title}: ${degrees}` : title}</p>
    </div>
  );
}

/** The chords of the turn in order; the one asked now is marked. */
function Turn({ asks, chordNo, chordStyle }: { asks: readonly Ask[]; chordNo: number; chordStyle: ChordStyle }) {
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
