'use client';

import { Volume2 } from 'lucide-react';
import { Keyboard } from '@/components/keyboard/keyboard';
import { keyboardRange } from '@/components/keyboard/keyboard-shape';
import { marksOf } from '@/components/keyboard/marks';
import { playInTime } from '@/components/keyboard/sound';
import { ChordRow } from '@/components/stave/chord-row';
import { Button } from '@/components/ui/button';
import type { SheetRow } from '@/lib/ladder/server/practice-sheet';

const SECONDS_A_CHORD = 2;
const NO_KEYS: ReadonlySet<number> = new Set();

/** Each key of the rung: the notes on the stave, the keys under the hand, the degrees to learn it by. */
export function SheetRows({ rows }: { rows: readonly SheetRow[] }) {
  return <ul className="grid gap-4">{rows.map((row, at) => <Row key={at} row={row} />)}</ul>;
}

function Row({ row: { label, asks, chords, degrees } }: { row: SheetRow }) {
  const hasNotes = chords.some(({ notes }) => notes.length > 0);
  return (
    <li className="sheet break-inside-avoid p-4">
      <div className="flex items-baseline justify-between gap-3">
        <h2 className="text-h2">{label}</h2>
        {hasNotes ? <Button kind="quiet" className="no-print" icon={<Volume2 size={16} aria-hidden />} onClick={() => void playInTime(asks.map(({ shown }) => shown.notes.map(({ key }) => key)), SECONDS_A_CHORD)}>Play it softly</Button> : null}
      </div>
      {hasNotes ? <ChordRow chords={chords} label={label} /> : null}
      <div className="mt-2 grid gap-4 sm:grid-cols-2 xl:grid-cols-3">
        {asks.map((ask, at) => (
          <div key={at} className="min-w-0">
            <p className="mb-1">{chords[at]?.name === label ? null : <b>{chords[at]?.name} </b>}<span className="text-ink-2">{degrees[at]}</span></p>
            {ask.shown.notes.length > 0 ? <Keyboard {...keyboardRange(ask.shown.notes.map(({ key }) => key))} label={`Keys of ${chords[at]?.name ?? ''}`} held={NO_KEYS} marks={marksOf(ask.shown.notes)} /> : null}
          </div>
        ))}
      </div>
    </li>
  );
}
