'use client';

import { Check, Minus } from 'lucide-react';
import type { ChordStyle } from '@/lib/harmony/chord-name';
import { drawnLabel } from '@/lib/ladder/asks';
import type { PracticeRung } from '@/lib/ladder/server/practice-today';
import type { Practice } from './use-practice';

const LOOKS = { now: 'border-brass-fill bg-brass-wash', sits: 'border-felt bg-felt-wash', not_yet: 'border-brass bg-sheet', open: 'border-rule-strong bg-sheet' } as const;
const WORDS = { now: ', asked now', sits: ', sits', not_yet: ', not yet', open: ', to come' } as const;

/** The keys of this piece: which sit, which do not yet. Each can be chosen. */
export function KeysPractised({ practice, rung, chordStyle }: { practice: Practice; rung: PracticeRung; chordStyle: ChordStyle }) {
  const { judged, goTo } = practice;
  return (
    <nav aria-label="Keys of this piece">
      <ul className="flex flex-wrap gap-[6px]">
        {rung.keys.map((drawn, no) => {
          const state = stateOf(no, practice);
          return (
            <li key={no}>
              <button type="button" onClick={() => goTo(no)} aria-current={state === 'now' ? 'step' : undefined} className={`flex min-h-[36px] min-w-[46px] items-center justify-center gap-1 rounded-[3px] border px-2 text-[14px] font-semibold tap ${LOOKS[state]}`}>
                {drawnLabel(rung.spec, drawn, chordStyle)}
                {judged[no]?.isHeard ? <Check size={12} aria-hidden /> : state === 'not_yet' ? <Minus size={12} aria-hidden /> : null}
                <span className="sr-only">{WORDS[state]}</span>
              </button>
            </li>
          );
        })}
      </ul>
    </nav>
  );
}

function stateOf(no: number, { keyNo, judged, answers }: Practice): keyof typeof LOOKS {
  if (no === keyNo) return 'now';
  if (judged[no]?.isHeard) return 'sits';
  return (answers[no]?.chords.length ?? 0) > 0 ? 'not_yet' : 'open';
}
