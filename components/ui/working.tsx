'use client';

import { useId, useState, type ReactNode } from 'react';

/** A computed figure that opens to show how it came about, sentence by sentence. Made of spans, so that it may stand within a sentence. */
export function Working({ figure, steps, align = 'left' }: { figure: ReactNode; steps: readonly ReactNode[]; align?: 'left' | 'right' }) {
  const id = useId();
  const [isOpen, setIsOpen] = useState(false);
  if (steps.length === 0) return <>{figure}</>;
  return (
    <span className={`inline-block max-w-full ${align === 'right' ? 'text-right' : ''}`}>
      <button type="button" aria-expanded={isOpen} aria-controls={id} onClick={() => setIsOpen(!isOpen)} className="cursor-pointer text-inherit underline decoration-rule-strong decoration-dotted underline-offset-4 hover:decoration-ink">
        {figure}
        <span className="sr-only"> (show how this was worked out)</span>
      </button>
      <span id={id} role="list" hidden={!isOpen} className={isOpen ? 'appear mt-1 flex flex-col gap-[2px] rounded bg-wash px-3 py-2 text-left text-small font-normal text-ink-2' : undefined}>
        {steps.map((step, index) => <span key={index} role="listitem">{step}</span>)}
      </span>
    </span>
  );
}
