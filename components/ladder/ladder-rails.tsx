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
        const line = rungLine(isPlain ? plainMissing(rung) : rung, { isNext: rung.id === next[0], isHeardNow, locale });
        return (
          <li key={rung.id} className={`grid min-h-[62px] grid-cols-[44px_minmax(0,1fr)] items-center gap-3 ${rung.id === chosen ? 'bg-wash' : ''}`}>
            <RungBar state={isHeardNow ? 'hearing' : rung.state} />
            <div className="py-2 pr-1">
              <RungName rung={rung} isPlain={isPlain} isChosen={rung.id === chosen} href={hrefOf?.(rung.id)} />
              {isPlain ? <PlainWords rung={rung} line={line} /> : <p className="text-small text-ink-3">{line}</p>}
            </div>
          </li>
        );
      })}
    </ol>
  );
}

function RungName({ rung: { state, title, plainTitle }, isPlain, isChosen, href }: { rung: LadderRung; isPlain: boolean; isChosen: boolean; href: string | undefined }) {
  const look = `font-bold leading-snug ${state === 'locked' || state === 'open' ? 'text-ink-2' : 'text-ink'}`;
  const name = isPlain ? plainTitle : title;
  return href === undefined ? <p className={look}>{name}</p> : <Link href={href} scroll={false} aria-current={isChosen ? 'true' : undefined} className={`no-underline hover:underline ${look}`}>{name}</Link>;
}

function PlainWords({ rung: { canDo, title }, line }: { rung: LadderRung; line: string }) {
  return (
    <>
      <p className="text-small text-ink-2">{`${canDo.charAt(0).toUpperCase()}${canDo.slice(1)}.`}</p>
      <p className="text-small text-ink-3">{line}</p>
      <p className="text-[12.5px] text-ink-3">{`Musicians say: ${title}`}</p>
    </>
  );
}

const plainMissing = (rung: LadderRung): LadderRung => ({ ...rung, missing: rung.missing.map((one) => ({ ...one, title: one.plainTitle })) });
