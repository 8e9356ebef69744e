import { hasRung } from '@/lib/ladder/rung-state';
import type { LadderLevel } from '@/lib/ladder/student-ladder';

const STEP_HEIGHT = 14;
const FIRST_STEP = 12;

/** A small picture for families: one stair per level, its rungs as bars, green when passed. The figures stand in its label. */
export function LadderBars({ levels }: { levels: readonly LadderLevel[] }) {
  return (
    <ol className="grid gap-[6px]" style={{ gridTemplateColumns: `repeat(${levels.length}, minmax(0, 1fr))` }}>
      {levels.map(({ no, shortTitle, rungs }, at) => {
        const passed = rungs.filter(({ state }) => hasRung(state)).length;
        return (
          <li key={no} className="flex h-[132px] flex-col justify-end">
            <span className="sr-only">{`Level ${no}, ${shortTitle}: ${passed} of ${rungs.length} rungs passed.`}</span>
            <span aria-hidden className="flex flex-col-reverse gap-[3px] pb-[6px]">
              {rungs.map(({ id, state }) => <span key={id} className={`h-[7px] rounded-[2px] ${hasRung(state) ? 'bg-felt' : state === 'working' ? 'border border-brass-fill bg-brass-wash' : 'bg-rule'}`} />)}
            </span>
            <span aria-hidden className="border-t-[3px] border-ink bg-wash" style={{ height: FIRST_STEP + at * STEP_HEIGHT }} />
            <span aria-hidden className="truncate pt-1 text-small font-semibold">{shortTitle}</span>
          </li>
        );
      })}
    </ol>
  );
}
