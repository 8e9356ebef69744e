'use client';

import { Check, Minus } from 'lucide-react';
import type { ChordStyle } from '@/lib/harmony/chord-name';
import { drawnLabel, type DrawnKey } from '@/lib/ladder/asks';
import type { HearingScreen } from '@/lib/ladder/server/hearing-screen';
import type { Hearing } from './use-hearing';

type KeysHeardProps = { hearing: Hearing; rung: NonNullable<HearingScreen['rung']>; drawn: readonly DrawnKey[]; chordStyle: ChordStyle };

/** The drawn keys as a grid: heard, not right yet, asked now, still to come. Each can be chosen. */
export function KeysHeard({ hearing, rung, drawn, chordStyle }: KeysHeardProps) {
  const { tries, drawnNo, keysHeard, goTo } = hearing;
  const within = rung.criteria.seconds ? ` within ${rung.criteria.seconds} s each` : '';
  return (
    <section className="sheet px-4 py-[14px]" aria-label="Keys heard">
      <p className="eyebrow">Keys heard</p>
      <ul className="mt-[10px] grid gap-[6px]" style={{ gridTemplateColumns: `repeat(auto-fill, minmax(${drawn.some((one) => drawnLabel(rung.spec, one, chordStyle).length > 4) ? 62 : 46}px, 1fr))` }}>
        {drawn.map((one, no) => {
          const state = no === drawnNo ? 'now' : tries.get(no) === true ? 'heard' : tries.has(no) ? 'not_right' : 'open';
          return (
            <li key={no}>
              <button type="button" onClick={() => goTo(no)} aria-current={state === 'now' ? 'step' : undefined}
                className={`flex min-h-[34px] w-full items-center justify-center gap-1 rounded-[3px] border px-1 text-[14px] font-semibold tap ${LOOKS[state]}`}>
                {drawnLabel(rung.spec, one, chordStyle)}
                {tries.get(no) === true ? <Check size={12} aria-hidden /> : state === 'not_right' ? <Minus size={12} aria-hidden /> : null}
                <span className="sr-only">{WORDS[state]}</span>
              </button>
            </li>
          );
        })}
      </ul>
      <p className="mt-[10px] text-small text-ink-3">{`${keysHeard} of ${drawn.length}. The rung asks for ${rung.keysNeeded === rung.keysDrawn ? 'all of them' : `any ${rung.keysNeeded}`}${within}.`}</p>
    </section>
  );
}

const LOOKS = {
  now: 'border-brass-fill bg-brass-wash text-ink', heard: 'border-felt bg-felt-wash text-ink', not_right: 'border-brass bg-sheet text-ink', open: 'border-rule-strong bg-sheet text-ink',
} as const;
const WORDS = { now: ', asked now', heard: ', heard', not_right: ', not right yet', open: ', to come' } as const;
