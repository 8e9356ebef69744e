import { RotateCcw } from 'lucide-react';
import Link from 'next/link';
import { LadderRails } from '@/components/ladder/ladder-rails';
import { Chip } from '@/components/ui/chip';
import { Sheet } from '@/components/ui/sheet';
import { formatDate } from '@/lib/format';
import type { OpenRecheck, StudentStanding } from '@/lib/ladder/server/student-standing';
import { rungLine } from '@/lib/ladder/rung-line';
import { currentLevel, type LadderRung } from '@/lib/ladder/student-ladder';

type HearingLink = (rungId: string) => string | null;

/** Level, what can be played now, what is to be heard once more, the level as a drawing, and the rungs to climb next. */
export function WhereTheyStand({ standing: { ladder, level, words, next, rechecks, may }, locale }: { standing: StudentStanding; locale: string }) {
  const hearingAt = (rungId: string) => `/hearings/${ladder.student.id}?rung=${rungId}`;
  const hearing: HearingLink = (rungId) => (may.hear ? hearingAt(rungId) : null);
  const current = currentLevel(ladder);
  return (
    <Sheet eyebrow={level ? `Level ${level.no} · ${level.passed} of ${level.count} passed` : 'Ladder'} title={level?.title}>
      <p className="max-w-[60ch]">{words.now}</p>
      {words.when ? <p className="mt-1 max-w-[60ch] text-ink-3">{`Next rung: ${words.when.charAt(0).toLowerCase()}${words.when.slice(1)}`}</p> : null}
      {rechecks.length > 0 ? <Rechecks rechecks={rechecks} locale={locale} hearing={hearing} /> : null}
      <div className="mt-4 grid items-start gap-x-6 gap-y-4 md:grid-cols-2">
        {current ? <LadderRails rungs={current.rungs} next={ladder.next} locale={locale} {...(may.hear ? { hrefOf: hearingAt } : {})} /> : null}
        <NextRungs next={next} locale={locale} hearing={hearing} />
      </div>
    </Sheet>
  );
}

function NextRungs({ next, locale, hearing }: { next: readonly LadderRung[]; locale: string; hearing: HearingLink }) {
  return (
    <div>
      <h3 className="eyebrow mb-1">Next rungs</h3>
      {next.length === 0 ? <p className="text-ink-3">The whole ladder is climbed.</p> : (
        <ol>
          {next.map((rung, at) => (
            <li key={rung.id} className="border-t border-rule py-2">
              <p className="flex flex-wrap items-baseline justify-between gap-x-3"><RungName code={rung.code} title={rung.title} href={hearing(rung.id)} /><span className="text-small text-ink-3">{rungLine(rung, { isNext: at === 0, isHeardNow: false, locale })}</span></p>
              <p className="text-small text-ink-3">{rung.plainTitle}</p>
            </li>
          ))}
        </ol>
      )}
    </div>
  );
}

function Rechecks({ rechecks, locale, hearing }: { rechecks: readonly OpenRecheck[]; locale: string; hearing: HearingLink }) {
  return (
    <>
      <h3 className="eyebrow mb-1 mt-4">To be heard once more</h3>
      <ul className="grid gap-2">
        {rechecks.map(({ rungId, code, title, reason, by, on }) => (
          <li key={rungId} className="rounded bg-brass-wash px-3 py-2">
            <p className="flex flex-wrap items-center justify-between gap-2"><RungName code={code} title={title} href={hearing(rungId)} /><Chip tone="wait" icon={<RotateCcw size={13} aria-hidden />}>re-check</Chip></p>
            {by && on ? <p className="mt-1 text-small">{`${by} asked on ${formatDate(on, locale)}: ${reason}`}</p> : null}
          </li>
        ))}
      </ul>
    </>
  );
}

function RungName({ code, title, href }: { code: string; title: string; href: string | null }) {
  const name = <><span className="num mr-2 text-ink-3">{code}</span>{title}</>;
  return href ? <Link href={href} className="font-bold text-ink no-underline hover:underline tap">{name}</Link> : <span className="font-bold">{name}</span>;
}
