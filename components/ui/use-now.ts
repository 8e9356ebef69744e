'use client';

import { useSyncExternalStore } from 'react';

const TICK_MS = 10_000;
const read = () => Math.floor(Date.now() / TICK_MS) * (TICK_MS / 1000);

function subscribe(onTick: () => void): () => void {
  const timer = setInterval(onTick, 1000);
  return () => clearInterval(timer);
}

/** The time in seconds, ticking every ten; null on the server, whose clock is not the reader's. */
export const useNow = (): number | null => useSyncExternalStore(subscribe, read, () => null);
