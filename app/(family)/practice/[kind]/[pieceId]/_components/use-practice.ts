'use client';

import { useCallback, useMemo, useState } from 'react';
import type { KeyNumber } from '@/lib/harmony/note';
import type { Verdict } from '@/lib/harmony/verdict';
import { asksOf, judgeAsk } from '@/lib/ladder/asks';
import { judgePractice, type PlayedKey } from '@/lib/ladder/practice';
import type { PracticeRung } from '@/lib/ladder/server/practice-today';

type Chord = PlayedKey['chords'][number];
export type PracticeTold = { symbol: string; played: readonly KeyNumber[]; verdict: Verdict | null; byEar: Chord['byEar'] };

/** The course of one piece: which key, which chord of it, and what was played for each. A key played again takes the place of the last try. */
export function usePractice(rung: PracticeRung) {
  const [keyNo, setKeyNo] = useState(0);
  const [chords, setChords] = useState<Chord[]>([]);
  const [played, setPlayed] = useState<ReadonlyMap<number, PlayedKey>>(new Map());
  const [told, setTold] = useState<PracticeTold | null>(null);
  const asks = useMemo(() => { const drawn = rung.keys[keyNo]; return drawn ? asksOf(rung.spec, drawn) : []; }, [rung, keyNo]);
  const ask = asks[Math.min(chords.length, asks.length - 1)];
  const answers = useMemo(() => rung.keys.map((_key, at): PlayedKey => played.get(at) ?? { chords: [] }), [rung.keys, played]);
  const judged = useMemo(() => judgePractice(rung, rung.keys, answers), [rung, answers]);

  const goTo = useCallback((no: number) => { setKeyNo(no); setChords([]); setTold(null); }, []);
  const take = useCallback((chord: Chord) => {
    if (!ask) return;
    setTold({ symbol: ask.symbol, played: chord.played, verdict: chord.byEar === null ? judgeAsk(ask, chord.played) : null, byEar: chord.byEar });
    const heard = [...chords, chord];
    if (heard.length < asks.length) return setChords(heard);
    setChords([]);
    setPlayed((before) => new Map(before).set(keyNo, { chords: heard }));
  }, [ask, asks.length, chords, keyNo]);

  const takeKeys = useCallback((keys: KeyNumber[]) => take({ played: keys, byEar: null }), [take]);
  const takeOwnWord = useCallback((byEar: 'right' | 'not_right') => take({ played: [], byEar }), [take]);
  const isRight = useCallback((keys: KeyNumber[]) => ask !== undefined && judgeAsk(ask, keys).isRight, [ask]);
  /** The next key that does not sit yet, going round. */
  const next = useCallback(() => {
    const order = rung.keys.map((_key, step) => (keyNo + 1 + step) % rung.keys.length);
    goTo(order.find((no) => judged[no]?.isHeard !== true) ?? (keyNo + 1) % rung.keys.length);
  }, [rung.keys, keyNo, judged, goTo]);
  return { keyNo, asks, ask, chordNo: chords.length, told, answers, judged, triedCount: played.size, goTo, next, takeKeys, takeOwnWord, isRight };
}

export type Practice = ReturnType<typeof usePractice>;
