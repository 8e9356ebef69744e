'use client';

import { printedNote } from '@/lib/harmony/note';
import { barsInLine, drawChordRow, SYSTEM_HEIGHT, type RowChord } from './draw-row';
import { useDrawing } from './use-drawing';

/** Chords in a row with their symbols. For a screen reader each chord is named with its notes from the bottom up. */
export function ChordRow({ chords, label }: { chords: readonly RowChord[]; label: string }) {
  const { host, width, hasFailed } = useDrawing(chords.map(({ name, notes }) => name + notes.join(' ')).join('|'), (vex, element, room) => drawChordRow(vex, element, chords, room));
  const words = chords.map(({ name, notes }) => `${name}: ${notes.length > 0 ? `${notes.map(printedNote).join(', ')} from the bottom` : 'free'}`);
  return (
    <figure role="img" aria-label={`${label}. ${words.join('. ')}`} className="m-0 break-inside-avoid">
      <div ref={host} className="[&>svg]:block" style={{ minHeight: Math.ceil(chords.length / barsInLine(Math.max(width, 320))) * SYSTEM_HEIGHT }} aria-hidden />
      {hasFailed ? <p className="text-small text-ink-3">{words.join('. ')}</p> : null}
    </figure>
  );
}
