import { Hand } from 'lucide-react';

/** After so many minutes: rest. It never counts against anybody. */
export function BreakHint({ minutes, breakMinutes }: { minutes: number; breakMinutes: number }) {
  const isDue = minutes > breakMinutes;
  return (
    <div aria-live="polite">
      {isDue ? <p className="flex gap-2 rounded bg-petrol-wash px-3 py-[10px] text-petrol"><Hand size={18} aria-hidden className="mt-[2px] shrink-0" />{`${breakMinutes} minutes of playing. Rest your hands for five; the piece waits.`}</p> : null}
    </div>
  );
}
