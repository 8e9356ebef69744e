'use client';

import { Check, SkipForward, X } from 'lucide-react';
import { useState } from 'react';
import { AnswerSwitch, AskedAnswer, ChordsInTurn } from '@/components/play/asked';
import { PlayArea } from '@/components/play/play-area';
import { VerdictWords, verdictText, type VerdictText } from '@/components/play/verdict-words';
import { Button } from '@/components/ui/button';
import { chordName, type ChordStyle } from '@/lib/harmony/chord-name';
import { chordOf } from '@/lib/harmony/chord';
import { handsSentence, splitHands } from '@/lib/harmony/hands';
import { askDegrees, askName, type Ask } from '@/lib/ladder/asks';
import { isSpoken } from '@/lib/ladder/play-spec';
import type { PracticePiece, PracticeRung } from '@/lib/ladder/server/practice-today';
import type { Practice, PracticeTold } from './use-practice';

type PlayPanelProps = { practice: Practice; piece: PracticePiece; rung: PracticeRung; reachSemitones: number; chordStyle: ChordStyle };

/** What is asked now, the keys to play it on, and what was right or is to change. A review begins without the answer. */
export function PlayPanel({ practice, piece, rung, reachSemitones, chordStyle }: PlayPanelProps) {
  const [isShown, setIsShown] = useState(piece.kind !== 'review');
  const { ask, asks, chordNo, next, takeKeys, takeOwnWord, isRight } = practice;
  if (!ask) return null;
  const spoken = isSpoken(rung.spec.how);
  return (
    <section className="sheet min-w-0 p-4" aria-label="Asked now">
      <AskedHeading ask={ask} piece={piece} isShown={isShown} chordStyle={chordStyle} />
      {asks.length > 1 ? <ChordsInTurn asks={asks} chordNo={Math.min(chordNo, asks.length - 1)} chordStyle={chordStyle} /> : null}
      {isShown ? <AskedAnswer ask={ask} chordStyle={chordStyle} /> : null}
      {spoken ? <OwnWord onWord={takeOwnWord} /> : <PlayArea ask={ask} isShown={isShown} isBusy={false} isRight={isRight} onKeys={takeKeys} />}
      <Told practice={practice} chordStyle={chordStyle} />
      <div className="mt-2 flex flex-wrap items-center gap-x-4 gap-y-2 border-t border-rule pt-3">
        <Button icon={<SkipForward size={16} aria-hidden />} onClick={next}>Next key</Button>
        <AnswerSwitch isShown={isShown} onSwitch={() => setIsShown(!isShown)} />
      </div>
      {isShown && !spoken ? <p className="mt-2 text-small text-ink-3">{handsWords(ask, reachSemitones)}</p> : null}
    </section>
  );
}

function AskedHeading({ ask, piece: { beatsPerMinute, howRight }, isShown, chordStyle }: { ask: Ask; piece: PracticePiece; isShown: boolean; chordStyle: ChordStyle }) {
  const facts = [beatsPerMinute ? `${beatsPerMinute} beats a minute` : '', howRight].filter((part) => part !== '');
  return (
    <>
      <div className="flex flex-wrap items-baseline gap-x-3 gap-y-1">
        <h2 className="text-[30px]">{askName(ask, chordStyle)}</h2>
        <p className="text-ink-3">{isShown ? askDegrees(ask) : ''}</p>
      </div>
      {facts.length > 0 ? <p className="num text-small text-ink-3">{facts.join(' · ')}</p> : null}
    </>
  );
}

function Told({ practice: { told, asks }, chordStyle }: { practice: Practice; chordStyle: ChordStyle }) {
  return (
    <div aria-live="polite" className="mt-3 min-h-[46px]">
      {told ? <VerdictWords text={wordsOf(told)} {...(asks.length > 1 ? { name: chordName(chordOf(told.symbol), chordStyle) } : {})} /> : null}
    </div>
  );
}

function handsWords({ shown: { notes } }: Ask, reachSemitones: number): string {
  if (notes.length === 0) return 'Any spacing that lies well.';
  return handsSentence(splitHands(notes.map(({ key }) => key), reachSemitones, notes.find(({ degree }) => degree === '5')?.key));
}

const wordsOf = ({ verdict, played, byEar }: PracticeTold): VerdictText => {
  if (verdict) return verdictText(verdict, played);
  return byEar === 'right' ? { headline: 'You had it.', details: [], isGood: true } : { headline: 'Not yet.', details: ['Look at the answer, say it aloud, and come back to it.'], isGood: false };
};

/** What is said, not played: the student looks at the answer and says honestly how it went. */
function OwnWord({ onWord }: { onWord: (word: 'right' | 'not_right') => void }) {
  return (
    <div role="group" aria-label="Did you have it?" className="mt-4 grid grid-cols-2 gap-3">
      <Button icon={<Check size={16} aria-hidden />} className="min-h-[52px]" onClick={() => onWord('right')}>I had it</Button>
      <Button icon={<X size={16} aria-hidden />} className="min-h-[52px]" onClick={() => onWord('not_right')}>Not yet</Button>
    </div>
  );
}
