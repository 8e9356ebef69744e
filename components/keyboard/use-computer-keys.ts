'use client';

import { useEffect, useRef } from 'react';
import type { KeyNumber } from '@/lib/harmony/note';
import { keyOfComputerKey } from './keyboard-shape';

type Handlers = { base: KeyNumber; isOn: boolean; onDown: (key: KeyNumber) => void; onUp: (key: KeyNumber) => void };

const isTyping = (target: EventTarget | null): boolean =>
  target instanceof HTMLElement && (target.isContentEditable || ['INPUT', 'TEXTAREA', 'SELECT'].includes(target.tagName));

/** Plays on the letter keys of a computer while nobody is typing words. */
export function useComputerKeys({ base, isOn, onDown, onUp }: Handlers): void {
  const sounding = useRef(new Map<string, KeyNumber>());
  useEffect(() => {
    if (!isOn) return;
    const keys = sounding.current;
    const down = (event: KeyboardEvent) => {
      if (event.repeat || event.ctrlKey || event.metaKey || event.altKey || isTyping(event.target)) return;
      const key = keyOfComputerKey(event.code, base);
      if (key === null) return;
      event.preventDefault();
      keys.set(event.code, key);
      onDown(key);
    };
    const release = (code: string) => {
      const key = keys.get(code);
      if (key === undefined) return;
      keys.delete(code);
      onUp(key);
    };
    const up = (event: KeyboardEvent) => release(event.code);
    const releaseAll = () => { for (const code of [...keys.keys()]) release(code); };
    window.addEventListener('keydown', down);
    window.addEventListener('keyup', up);
    window.addEventListener('blur', releaseAll);
    return () => {
      releaseAll();
      window.removeEventListener('keydown', down);
      window.removeEventListener('keyup', up);
      window.removeEventListener('blur', releaseAll);
    };
  }, [base, isOn, onDown, onUp]);
}
