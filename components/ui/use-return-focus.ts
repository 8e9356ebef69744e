'use client';

import { useRef } from 'react';

/**
 * Gives the focus back to where it came from when a dialog closes. The primitive does so only for a trigger of its
 * own; ours are opened from rows, menus and keys.
 */
export function useReturnFocus() {
  const cameFrom = useRef<HTMLElement | null>(null);
  return {
    onOpenAutoFocus: () => {
      cameFrom.current = document.activeElement instanceof HTMLElement ? document.activeElement : null;
    },
    onCloseAutoFocus: (event: Event) => {
      event.preventDefault();
      // Where the opener is gone (its row was removed), the page itself takes the focus.
      const target = cameFrom.current?.isConnected ? cameFrom.current : document.getElementById('content');
      target?.focus();
    },
  };
}
