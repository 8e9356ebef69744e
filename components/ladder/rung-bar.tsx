import type { RungState } from '@/lib/ladder/rung-state';

const BARS: Record<RungState | 'hearing', string> = {
  passed: 'h-[6px] bg-felt',
  credited: 'h-[6px] bg-felt/60',
  recheck_due: 'h-0 border-t-[6px] border-dashed border-felt',
  working: 'h-[6px] border border-brass-fill bg-brass-wash',
  hearing: 'h-[8px] bg-brass-fill',
  open: 'h-[6px] bg-rule-strong',
  locked: 'h-[6px] bg-rule',
};

/** One rung between two rails; the word beside it says the same. */
export function RungBar({ state }: { state: RungState | 'hearing' }) {
  return (
    <span aria-hidden className="flex items-center self-stretch border-x-[3px] border-ink">
      <span className={`block w-full ${BARS[state]}`} />
    </span>
  );
}
