'use client';

import { useCallback, useEffect, useRef } from 'react';
import type { KeyNumber } from '@/lib/harmony/note';

type Capture = {
  held: ReadonlySet<KeyNumber>;
  isLatched: boolean;
  isOn: boolean;
  isRight: (keys: KeyNumber[]) => boolean;
  /** @param lastDownAt milliseconds on the browser's steady clock */
  onChord: (keys: KeyNumber[], lastDownAt: number) => void;
};

/** Long enough that one more finger still counts to the same chord. */
const SETTLE_MILLISECONDS = 150;

/**
 * Finds out when a chord is meant: at once when it is right, else when all keys are let go, with the most keys that
 * were down together. Latched keys are only taken when right; otherwise the teacher says "hear these keys".
 */
export function useChordCapture({ held, isLatched, isOn, isRight, onChord }: Capture): void {
  const most = useRef<KeyNumber[]>([]);
  const count = useRef(0);
  const lastDownAt = useRef(0);
  const isSpent = useRef(false);
  const handlers = useRef({ isRight, onChord });
  useEffect(() => { handlers.current = { isRight, onChord }; }, [isRight, onChord]);

  const watch = useCallback((keys: KeyNumber[]) => {
    if (keys.length > count.current) lastDownAt.current = performance.now();
    count.current = keys.length;
    if (keys.length >= most.current.length) most.current = keys;
  }, []);

  useEffect(() => {
    const keys = [...held].sort((a, b) => a - b);
    watch(keys);
    const hear = (chord: KeyNumber[]) => { isSpent.current = true; handlers.current.onChord(chord, lastDownAt.current); };
    if (keys.length === 0) {
      const played = most.current;
      const isNew = isOn && !isLatched && !isSpent.current;
      if (isNew && played.length > 0) hear(played);
      most.current = [];
      isSpent.current = false;
    }
    if (keys.length === 0 || !isOn || isSpent.current || !handlers.current.isRight(keys)) return;
    const timer = setTimeout(() => hear(keys), SETTLE_MILLISECONDS);
    return () => clearTimeout(timer);
  }, [held, isLatched, isOn, watch]);
}
