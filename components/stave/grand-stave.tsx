'use client';

import { printedNote, type NoteName } from '@/lib/harmony/note';
import { drawGrandStave, STAVE_HEIGHT } from './draw-stave';
import { useDrawing } from './use-drawing';

const WIDEST_PX = 520;

/** One chord on a grand stave. Until it is drawn, and where it cannot be, the names stand there. */
export function GrandStave({ notes, label }: { notes: readonly NoteName[]; label: string }) {
  const { host, hasFailed } = useDrawing(notes.join(' '), (vex, element, width) => drawGrandStave(vex, element, notes, Math.min(width, WIDEST_PX)));
  return (
    <figure role="img" aria-label={`${label}: ${notes.map(printedNote).join(', ')}`} className="m-0">
      <div ref={host} className="[&>svg]:block" style={{ minHeight: STAVE_HEIGHT }} aria-hidden />
      {hasFailed ? <p className="text-small text-ink-3">{notes.map(printedNote).join('  ')}</p> : null}
    </figure>
  );
}
