'use client';

import { SkipForward } from 'lucide-react';
import { useState } from 'react';
import { AnswerSwitch, AskedAnswer, ChordsInTurn } from '@/components/play/asked';
import { PlayArea } from '@/components/play/play-area';
import { Button } from '@/components/ui/button';
import { Checkbox } from '@/components/ui/inputs';
import type { ChordStyle } from '@/lib/harmony/chord-name';
import { askDegrees, askName, type Ask } from '@/lib/ladder/asks';
import { isSpoken } from '@/lib/ladder/play-spec';
import type { HearingScreen } from '@/lib/ladder/server/hearing-screen';
import { EarButtons } from './ear-buttons';
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
      {asks.length > 1 ? <ChordsInTurn asks={asks} chordNo={chordNo} chordStyle={chordStyle} /> : null}
      {isShown ? <AskedAnswer ask={ask} chordStyle={chordStyle} /> : null}
      {spoken ? null : <PlayArea ask={ask} isShown={isShown} isBusy={hearing.isSending} isRight={hearing.isRight} onKeys={hearing.takeKeys} />}
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
