'use client';

import { useEffect, useState } from 'react';

const TICK_MS = 15_000;

/** Whole minutes since this piece was opened, at least one; a pause in another tab does not count. */
export function useMinutes(): number {
  const [milliseconds, setMilliseconds] = useState(0);
  useEffect(() => {
    let last = performance.now();
    const tick = () => {
      const now = performance.now();
      const passed = now - last;
      last = now;
      // A sleeping tab wakes up with hours on its clock: only what a tick can be is playing.
      if (!document.hidden) setMilliseconds((before) => before + Math.min(passed, TICK_MS * 2));
    };
    const timer = setInterval(tick, TICK_MS);
    const wake = () => { last = performance.now(); };
    document.addEventListener('visibilitychange', wake);
    return () => { clearInterval(timer); document.removeEventListener('visibilitychange', wake); };
  }, []);
  return Math.max(1, Math.ceil(milliseconds / 60_000));
}
