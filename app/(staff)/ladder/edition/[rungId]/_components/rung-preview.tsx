'use client';

import { useDeferredValue, useMemo } from 'react';
import { ChordRow } from '@/components/stave/chord-row';
import { Sheet } from '@/components/ui/sheet';
import { printedNote } from '@/lib/harmony/note';
import type { ChordStyle } from '@/lib/harmony/chord-name';
import { askName, asksOf, drawnLabel, type Ask } from '@/lib/ladder/asks';
import type { PlaySpec } from '@/lib/ladder/play-spec';
import { readTurns } from '@/lib/ladder/spec-text';
import type { RungFormState } from './use-rung-form';

type Shown = { label: string; asks: Ask[]; problem: null } | { label: string; asks: null; problem: string };

/** The notes in every key, worked out from what is typed just now: a voicing that falls off the keyboard is seen before it is saved. */
export function RungPreview({ form, chordStyle }: { form: RungFormState; chordStyle: ChordStyle }) {
  const turns = useDeferredValue(form.watch('turns'));
  const how = form.watch('how');
  const keyPool = form.watch('keyPool');
  const reading = useMemo(() => readTurns(turns), [turns]);
  const rows = useMemo(() => (reading.kind === 'turns' ? shownIn({ how, turns: reading.turns }, keyPool, chordStyle) : []), [reading, how, keyPool, chordStyle]);
  return (
    <Sheet eyebrow="In every key">
      <div aria-live="polite">
        {reading.kind === 'refused' ? <p className="rounded bg-brass-wash px-3 py-2 text-brass">{reading.message}</p> : null}
      </div>
      <ul className="grid gap-3">
        {rows.map((row, at) => (
          <li key={at} className="border-b border-rule pb-2 last:border-b-0">
            <p className="font-semibold">{row.label}</p>
            {row.problem === null ? <PreviewRow asks={row.asks} label={row.label} chordStyle={chordStyle} /> : <p className="text-brick">{row.problem}</p>}
          </li>
        ))}
      </ul>
    </Sheet>
  );
}

function PreviewRow({ asks, label, chordStyle }: { asks: readonly Ask[]; label: string; chordStyle: ChordStyle }) {
  const answers = asks.map(({ answer }) => answer).filter((answer) => answer !== null);
  if (answers.length > 0) return <p className="text-ink-2">{answers.join(' · ')}</p>;
  return <ChordRow label={label} chords={asks.map((ask) => ({ name: askName(ask, chordStyle), notes: ask.shown.notes.map(({ note }) => note) }))} />;
}

/** A chord by itself stands with its fellows in one row; chords that follow one another have a row for each key. */
function shownIn(spec: PlaySpec, keys: readonly string[], chordStyle: ChordStyle): Shown[] {
  const rows = keys.flatMap((key) => spec.turns.map((turn, at) => ({ isSingle: turn.length === 1, turn: at, row: shownInKey(spec, key, at, chordStyle) })));
  const singles = spec.turns.flatMap((turn, at): Shown[] => {
    const fitting = rows.flatMap(({ row, turn: of }) => (of === at && row.problem === null ? row.asks : []));
    return turn.length === 1 && fitting.length > 0 ? [{ label: turn[0]?.stacks.join(' or ') || 'Any voicing', asks: fitting, problem: null }] : [];
  });
  return [...rows.filter(({ row }) => row.problem !== null).map(({ row }) => row), ...singles, ...rows.filter(({ isSingle, row }) => !isSingle && row.problem === null).map(({ row }) => row)];
}

function shownInKey(spec: PlaySpec, key: string, turn: number, chordStyle: ChordStyle): Shown {
  try {
    return { label: drawnLabel(spec, { key, turn }, chordStyle), asks: asksOf(spec, { key, turn }), problem: null };
  } catch {
    return { label: printedNote(key), asks: null, problem: 'This does not fit its place on the keyboard in this key. Widen the place.' };
  }
}
