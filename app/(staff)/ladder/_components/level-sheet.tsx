import { ChevronDown } from 'lucide-react';
import Link from 'next/link';
import { plural } from '@/lib/format';
import type { SchoolLevel, SchoolRung } from '@/lib/ladder/server/school-ladder';

/** One level to unfold: its rungs for teachers and in plain words, and how many students stand there. */
export function LevelSheet({ level, climbers, isOpen }: { level: SchoolLevel; climbers: number; isOpen: boolean }) {
  const passed = Math.max(0, ...level.rungs.map((rung) => rung.passed));
  return (
    <details open={isOpen} className="group sheet">
      <summary className="flex list-none items-center justify-between gap-3 px-4 py-3 tap [&::-webkit-details-marker]:hidden">
        <span className="min-w-0">
          <span className="eyebrow block">{`Level ${level.no}`}</span>
          <span className="font-display text-h2 font-semibold">{level.title}</span>
          <span className="block text-small text-ink-3">{level.plainTitle}</span>
        </span>
        <span className="flex items-center gap-2 text-right text-small text-ink-3">
          {passed > 0 ? `${passed} of ${climbers} in it or beyond` : plural(level.rungs.length, 'rung')}
          <ChevronDown size={16} aria-hidden className="shrink-0 group-open:rotate-180" />
        </span>
      </summary>
      <ul className="border-t border-rule">
        {level.rungs.map((rung) => <RungRow key={rung.id} rung={rung} climbers={climbers} />)}
      </ul>
    </details>
  );
}

function RungRow({ rung, climbers }: { rung: SchoolRung; climbers: number }) {
  return (
    <li className="grid gap-x-6 gap-y-2 border-b border-rule px-4 py-3 last:border-b-0 lg:grid-cols-[minmax(0,1fr)_minmax(0,1fr)_210px]">
      <div>
        <p className="font-bold"><span className="num mr-2 text-ink-3">{rung.code}</span>{rung.title}</p>
        <p><Link href={`/sheets/${rung.id}`} className="inline-block py-1 text-small font-semibold text-petrol hover:underline" aria-label={`Practice sheet of ${rung.title}`}>Practice sheet</Link></p>
        <p className="text-small text-ink-3">{askedWords(rung)}</p>
        {rung.needs.length > 0 ? <p className="mt-1 text-small text-ink-3">{`Needs ${rung.needs.map(({ title, kind }) => (kind === 'must' ? title : `${title} (better first)`)).join(', ')}.`}</p> : null}
      </div>
      <div>
        <p className="font-semibold">{rung.plainTitle}</p>
        <p className="text-small">{`To ${rung.canDo}.`}</p>
        <p className="text-small text-ink-3">{rung.soundsLike}</p>
      </div>
      <Standing rung={rung} climbers={climbers} />
    </li>
  );
}

function askedWords({ criteria, keysDrawn, keysNeeded, isSpoken }: SchoolRung): string {
  const many = keysDrawn === keysNeeded ? `All ${keysDrawn}` : `${keysNeeded} of ${keysDrawn}`;
  const when = criteria.seconds ? `, ${criteria.seconds} s each` : criteria.tempo ? `, at ${criteria.tempo.beatsPerMinute} beats a minute` : '';
  return `${many}${isSpoken ? ', told aloud' : ''}${criteria.isShuffled ? ', shuffled' : ''}${when}. ${criteria.listenFor}`;
}

function Standing({ rung: { passed, working }, climbers }: { rung: SchoolRung; climbers: number }) {
  const share = (count: number) => `${climbers > 0 ? Math.min(100, (count * 100) / climbers) : 0}%`;
  return (
    <div className="self-center">
      <div aria-hidden className="flex h-2 overflow-hidden rounded-full bg-wash">
        <span className="bg-felt" style={{ width: share(passed) }} />
        <span className="bg-brass-fill" style={{ width: share(working) }} />
      </div>
      <p className="num mt-1 text-small text-ink-2">{`${passed} passed, ${working} working on it`}</p>
    </div>
  );
}
