import { ChevronDown } from 'lucide-react';
import { plural } from '@/lib/format';
import { hasRung } from '@/lib/ladder/rung-state';
import { currentLevel, type LadderLevel, type StudentLadder as Ladder } from '@/lib/ladder/student-ladder';
import { LadderRails } from './ladder-rails';

type StudentLadderProps = { ladder: Ladder; locale: string; isPlain?: boolean; hrefOf?: (rungId: string) => string };

/** The whole ladder of one student, the level they are at open, the rest to unfold; the top of the ladder on top. */
export function StudentLadder({ ladder, locale, isPlain = false, hrefOf }: StudentLadderProps) {
  const current = currentLevel(ladder);
  return (
    <div className="flex flex-col gap-2">
      <p className="text-ink-2">{`${ladder.passedCount} of ${plural(ladder.rungCount, 'rung')} passed. ${ladder.editionLabel}.`}</p>
      <div className="flex flex-col-reverse gap-2">
        {ladder.levels.map((level) => (
          <details key={level.no} open={level.no === current?.no} className="group rounded border border-rule bg-sheet">
            <summary className="flex list-none items-center justify-between gap-3 px-4 py-3 tap [&::-webkit-details-marker]:hidden">
              <span className="min-w-0">
                <span className="eyebrow block">{`Level ${level.no}`}</span>
                <span className="font-semibold">{isPlain ? level.plainTitle : level.title}</span>
                {isPlain ? <span className="block text-[12.5px] text-ink-3">{level.title}</span> : null}
              </span>
              <span className="flex items-center gap-2 whitespace-nowrap text-small text-ink-3">
                {levelLine(level)}
                <ChevronDown size={16} aria-hidden className="group-open:rotate-180" />
              </span>
            </summary>
            <div className="px-4 pb-4"><LadderRails rungs={level.rungs} next={ladder.next} locale={locale} isPlain={isPlain} {...(hrefOf ? { hrefOf } : {})} /></div>
          </details>
        ))}
      </div>
    </div>
  );
}

function levelLine({ rungs }: LadderLevel): string {
  const passed = rungs.filter(({ state }) => hasRung(state)).length;
  return passed === rungs.length ? 'all passed' : `${passed} of ${rungs.length}`;
}
