import type { ReactNode } from 'react';

/** A computed figure that opens to show how it came about, sentence by sentence. */
export function Working({ figure, steps, align = 'left' }: { figure: ReactNode; steps: readonly ReactNode[]; align?: 'left' | 'right' }) {
  if (steps.length === 0) return <>{figure}</>;
  return (
    <details className={`group inline-block max-w-full ${align === 'right' ? 'text-right' : ''}`}>
      <summary className="inline cursor-pointer list-none underline decoration-rule-strong decoration-dotted underline-offset-4 [&::-webkit-details-marker]:hidden">
        {figure}
        <span className="sr-only"> (show how this was worked out)</span>
      </summary>
      <ol className="appear mt-1 flex flex-col gap-[2px] rounded bg-wash px-3 py-2 text-left text-small text-ink-2">
        {steps.map((step, index) => <li key={index}>{step}</li>)}
      </ol>
    </details>
  );
}
