'use client';

import { LadderRails } from '@/components/ladder/ladder-rails';
import { Sheet } from '@/components/ui/sheet';
import { EmptyState } from '@/components/ui/states';
import type { HearingScreen } from '@/lib/ladder/server/hearing-screen';
import { HearingRoom } from './hearing-room';
import { PastHearings } from './past-hearings';
import { StartPanel } from './start-panel';

/** The ladder at the left, the asked chord in the middle, the teacher's decision at the right; on a phone one below the other. */
export function HearingDesk({ screen, locale }: { screen: HearingScreen; locale: string }) {
  const { rung, ladder, underWay, past } = screen;
  const level = ladder.levels.find(({ no }) => no === rung?.levelNo);
  if (!rung || !level) return <EmptyState title="This ladder has no rungs" />;
  const base = `/hearings/${ladder.student.id}`;
  const others = ladder.levels.filter(({ no }) => no !== level.no);
  return (
    <div className="grid items-start gap-4 xl:grid-cols-[250px_minmax(0,1fr)] xl:gap-[18px]">
      <div className="order-last grid gap-4 xl:order-first">
        <Sheet eyebrow={`Level ${level.no} · ${level.title}`}>
          <LadderRails rungs={level.rungs} next={ladder.next} locale={locale} heardNow={underWay ? rung.id : null} chosen={rung.id} hrefOf={(id) => `${base}?rung=${id}`} />
          <nav aria-label="Other levels" className="mt-4 flex flex-wrap gap-1 border-t border-rule pt-3">
            {others.map(({ no, shortTitle, rungs }) => <a key={no} href={`${base}?rung=${rungs[0]?.id ?? ''}`} className="rounded px-2 py-1 text-small font-semibold text-petrol no-underline hover:underline tap">{`${no} ${shortTitle}`}</a>)}
          </nav>
        </Sheet>
        <PastHearings past={past} locale={locale} />
      </div>
      {underWay?.isOwn ? <HearingRoom screen={screen} rung={rung} underWay={underWay} /> : <StartPanel screen={screen} rung={rung} locale={locale} />}
    </div>
  );
}
