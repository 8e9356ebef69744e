import type { ReactNode } from 'react';

export type ChipTone = 'neutral' | 'ok' | 'bad' | 'wait' | 'info' | 'plum';

const TONES: Record<ChipTone, string> = {
  neutral: 'bg-wash text-ink-2',
  ok: 'bg-felt-wash text-felt',
  bad: 'bg-brick-wash text-brick',
  wait: 'bg-brass-wash text-brass',
  info: 'bg-petrol-wash text-petrol',
  plum: 'bg-plum-wash text-plum',
};

/** A state in a word; the colour only repeats what the word says. */
export function Chip({ tone = 'neutral', icon, children, className = '' }: { tone?: ChipTone; icon?: ReactNode; children: ReactNode; className?: string }) {
  return (
    <span className={`inline-flex items-center gap-[5px] whitespace-nowrap rounded-full px-2 py-[2px] text-[12.5px] font-semibold ${TONES[tone]} ${className}`}>
      {icon}
      {children}
    </span>
  );
}
