'use client';

import { useEffect, useRef, useState, type RefObject } from 'react';
import type { VexFlow } from './draw-stave';

type Drawing = { host: RefObject<HTMLDivElement | null>; width: number; hasFailed: boolean };
const NARROWEST_PX = 120;

/** Draws in the browser only, and again when the room changes: notation measures its signs with a canvas. `content` says when it is another drawing. */
export function useDrawing(content: string, draw: (vex: VexFlow, host: HTMLDivElement, width: number) => void): Drawing {
  const host = useRef<HTMLDivElement>(null);
  const latest = useRef(draw);
  const [width, setWidth] = useState(0);
  const [hasFailed, setHasFailed] = useState(false);
  useEffect(() => { latest.current = draw; }, [draw]);

  useEffect(() => {
    const element = host.current;
    if (!element) return;
    const observer = new ResizeObserver(([entry]) => setWidth(Math.floor(entry?.contentRect.width ?? 0)));
    observer.observe(element);
    return () => observer.disconnect();
  }, []);

  useEffect(() => {
    const element = host.current;
    if (!element || width < NARROWEST_PX) return;
    let isCurrent = true;
    import('vexflow/bravura').then(async (vex) => {
      await document.fonts.load('30px Bravura');
      if (isCurrent) latest.current(vex, element, width);
    }).catch(() => setHasFailed(true));
    return () => { isCurrent = false; };
  }, [content, width]);
  return { host, width, hasFailed };
}
