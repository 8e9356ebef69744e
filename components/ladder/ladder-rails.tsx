import Link from 'next/link';
import type { LadderRung } from '@/lib/ladder/student-ladder';
import { rungLine } from '@/lib/ladder/rung-line';
import { RungBar } from './rung-bar';

type LadderRailsProps = {
  rungs: readonly LadderRung[]; next: readonly string[]; locale: string;
  /** Family and student read the plain words first and the trade’s name small beneath; staff the trade’s name. */
  isPlain?: boolean;
  heardNow?: string | null;
  chosen?: string | null;
  hrefOf?: (rungId: string) => string;
};

/** Two rails and one rung per skill, read from the bottom up as one climbs. */
export function LadderRails({ rungs, next, locale, isPlain = false, heardNow = null, chosen = null, hrefOf }: LadderRailsProps) {
  return (
    <ol className="flex flex-col-reverse">
      {rungs.map((rung) => {
        const isHeardNow = rung.id === heardNow;
        const name = isPlain ? rung.plainTitle : rung.title;
        const tone = rung.state === 'locked' || rung.state === 'open' ? 'text-ink-2' : 'text-ink';
        return (
          <li key={rung.id} className={`grid min-h-[62px] grid-cols-[44px_minmax(0,1fr)] items-center gap-3 ${rung.id === chosen ? 'bg-wash' : ''}`}>
            <RungBar state={isHeardNow ? 'hearing' : rung.state} />
            <div className="py-2 pr-1">
              {hrefOf ? <Link href={hrefOf(rung.id)} scroll={false} aria-current={rung.id === chosen ? 'true' : undefined} className={`font-bold leading-snug no-underline hover:underline ${tone}`}>{name}</Link> : <p className={`font-bold leading-snug ${tone}`}>{name}</p>}
              {isPlain ? <PlainWords rung={rung} /> : null}
              <p className="text-small text-ink-3">{rungLine(isPlain ? plainMissing(rung) : rung, { isNext: rung.id === next[0], isHeardNow, locale })}</p>
            </div>
          </li>
        );
      })}
    </ol>
  );
}

function PlainWords({ rung: { canDo, title } }: { rung: LadderRung }) {
  return (
    <>
      <p className="text-small text-ink-2">{`${canDo.charAt(0).toUpperCase()}${canDo.slice(1)}.`}</p>
      <p className="text-[12.5px] text-ink-3">{`Musicians say: ${title}`}</p>
    </>
  );
}

const plainMissing = (rung: LadderRung): LadderRung => ({ ...rung, missing: rung.missing.map((one) => ({ ...one, title: one.plainTitle })) });
