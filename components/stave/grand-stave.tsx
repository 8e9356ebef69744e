'use client';

import { useEffect, useRef, useState } from 'react';
import { printedNote, type NoteName } from '@/lib/harmony/note';
import { drawGrandStave, STAVE_HEIGHT } from './draw-stave';

/** Drawn in the browser only: it measures its signs with a canvas. Until then, and without it, the names stand there. */
export function GrandStave({ notes, label }: { notes: readonly NoteName[]; label: string }) {
  const host = useRef<HTMLDivElement>(null);
  const [width, setWidth] = useState(0);
  const [hasFailed, setHasFailed] = useState(false);
  const names = notes.join(' ');

  useEffect(() => {
    const element = host.current;
    if (!element) return;
    const observer = new ResizeObserver(([entry]) => setWidth(Math.floor(entry?.contentRect.width ?? 0)));
    observer.observe(element);
    return () => observer.disconnect();
  }, []);

  useEffect(() => {
    const element = host.current;
    if (!element || width < 120) return;
    let isCurrent = true;
    import('vexflow/bravura').then(async (vex) => {
      await document.fonts.load('30px Bravura');
      if (isCurrent) drawGrandStave(vex, element, names === '' ? [] : names.split(' '), Math.min(width, 520));
    }).catch(() => setHasFailed(true));
    return () => { isCurrent = false; };
  }, [names, width]);

  return (
    <figure role="img" aria-label={`${label}: ${notes.map(printedNote).join(', ')}`} className="m-0">
      <div ref={host} className="[&>svg]:block" style={{ minHeight: STAVE_HEIGHT }} aria-hidden />
      {hasFailed ? <p className="text-small text-ink-3">{notes.map(printedNote).join('  ')}</p> : null}
    </figure>
  );
}
