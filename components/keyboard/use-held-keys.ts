'use client';

import { useCallback, useState } from 'react';
import type { KeyNumber } from '@/lib/harmony/note';

export type HeldKeys = {
  held: ReadonlySet<KeyNumber>;
  down: (key: KeyNumber) => void;
  up: (key: KeyNumber) => void;
  clear: () => void;
};

/**
 * The keys that sound. With `isLatched` a press keeps a key down until it is pressed again, so that one finger on a
 * phone, or a rolled chord, can build a whole voicing.
 */
export function useHeldKeys(isLatched: boolean): HeldKeys {
  const [held, setHeld] = useState<ReadonlySet<KeyNumber>>(() => new Set());
  const down = useCallback((key: KeyNumber) => setHeld((before) => {
    const next = new Set(before);
    if (isLatched && before.has(key)) next.delete(key);
    else next.add(key);
    return next;
  }), [isLatched]);
  const up = useCallback((key: KeyNumber) => {
    if (isLatched) return;
    setHeld((before) => {
      if (!before.has(key)) return before;
      const next = new Set(before);
      next.delete(key);
      return next;
    });
  }, [isLatched]);
  const clear = useCallback(() => setHeld((before) => (before.size === 0 ? before : new Set())), []);
  return { held, down, up, clear };
}
