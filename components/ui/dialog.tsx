'use client';

import { X } from 'lucide-react';
import { Dialog as Primitive } from 'radix-ui';
import type { ReactNode } from 'react';
import { useReturnFocus } from './use-return-focus';

type DialogProps = { open: boolean; onOpenChange: (open: boolean) => void; title: ReactNode; description?: ReactNode; children: ReactNode; wide?: boolean; side?: 'centre' | 'right' };

const PLACES = {
  centre: 'left-1/2 top-1/2 max-h-[88dvh] -translate-x-1/2 -translate-y-1/2 rounded-md max-md:inset-x-0 max-md:bottom-0 max-md:left-0 max-md:top-auto max-md:w-full max-md:translate-x-0 max-md:translate-y-0 max-md:rounded-b-none',
  right: 'inset-y-0 right-0 h-dvh rounded-l-md max-md:w-full',
};

/** Escape closes, focus stays inside and goes back to where it came from. `side="right"` makes it a drawer. */
export function Dialog({ open, onOpenChange, title, description, children, wide = false, side = 'centre' }: DialogProps) {
  const returnFocus = useReturnFocus();
  return (
    <Primitive.Root open={open} onOpenChange={onOpenChange}>
      <Primitive.Portal>
        <Primitive.Overlay className="appear fixed inset-0 z-40 bg-ink/40" />
        <Primitive.Content {...returnFocus} {...(description === undefined ? { 'aria-describedby': undefined } : {})} className={`appear fixed z-50 flex flex-col overflow-hidden border border-rule bg-sheet shadow-xl ${wide ? 'w-[min(860px,100vw)]' : 'w-[min(520px,100vw)]'} ${PLACES[side]}`}>
          <div className="flex items-start justify-between gap-4 border-b border-rule px-5 py-4">
            <div>
              <Primitive.Title className="text-h2">{title}</Primitive.Title>
              {description === undefined ? null : <Primitive.Description className="mt-1 text-ink-3">{description}</Primitive.Description>}
            </div>
            <Primitive.Close className="-mr-2 -mt-1 flex size-9 items-center justify-center rounded text-ink-3 hover:bg-wash tap" aria-label="Close">
              <X size={18} aria-hidden />
            </Primitive.Close>
          </div>
          <div className="overflow-y-auto px-5 py-4">{children}</div>
        </Primitive.Content>
      </Primitive.Portal>
    </Primitive.Root>
  );
}
