'use client';

import { Sheet } from '@/components/ui/sheet';
import type { ChordStyle } from '@/lib/harmony/chord-name';
import type { PracticePiece, PracticeRung } from '@/lib/ladder/server/practice-today';
import { BreakHint } from './break-hint';
import { FinishPanel } from './finish-panel';
import { KeysPractised } from './keys-practised';
import { PlayPanel } from './play-panel';
import { useMinutes } from './use-minutes';
import { usePractice } from './use-practice';

type RoomProps = { piece: PracticePiece; studentId: string; reachSemitones: number; breakMinutes: number; chordStyle: ChordStyle; locale: string };

/** One piece of practice: what to play, what was heard, and how it ends. */
export function PracticeRoom({ piece, ...room }: RoomProps) {
  const minutes = useMinutes();
  return (
    <div className="grid gap-4">
      <BreakHint minutes={minutes} breakMinutes={room.breakMinutes} />
      {piece.rung ? <RungRoom piece={piece} rung={piece.rung} minutes={minutes} {...room} /> : <TextRoom piece={piece} minutes={minutes} {...room} />}
    </div>
  );
}

type Inside = Omit<RoomProps, 'breakMinutes'> & { minutes: number };

function RungRoom({ piece, rung, minutes, studentId, reachSemitones, chordStyle, locale }: Inside & { rung: PracticeRung }) {
  const practice = usePractice(rung);
  return (
    <>
      <PlayPanel practice={practice} piece={piece} rung={rung} reachSemitones={reachSemitones} chordStyle={chordStyle} />
      <KeysPractised practice={practice} rung={rung} chordStyle={chordStyle} />
      <FinishPanel piece={piece} studentId={studentId} minutes={minutes} locale={locale} played={practice.answers} triedCount={practice.triedCount} keyCount={rung.keys.length} />
    </>
  );
}

function TextRoom({ piece, minutes, studentId, locale }: Inside) {
  return (
    <>
      <Sheet eyebrow="Play it">
        <p>{piece.text}</p>
        {piece.beatsPerMinute ? <p className="num mt-1 text-ink-2">{`${piece.beatsPerMinute} beats a minute`}</p> : null}
        {piece.howRight ? <p className="mt-1 text-ink-2">{piece.howRight}</p> : null}
      </Sheet>
      <FinishPanel piece={piece} studentId={studentId} minutes={minutes} locale={locale} played={[]} triedCount={0} keyCount={0} />
    </>
  );
}
