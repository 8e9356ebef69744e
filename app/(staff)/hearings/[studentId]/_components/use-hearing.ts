'use client';

import { useCallback, useEffect, useMemo, useRef, useState } from 'react';
import type { KeySource } from '@/components/play/play-area';
import { asksOf, judgeAsk, type Ask } from '@/lib/ladder/asks';
import type { KeyNumber } from '@/lib/harmony/note';
import type { Verdict } from '@/lib/harmony/verdict';
import type { HearingScreen, HearingUnderWay } from '@/lib/ladder/server/hearing-screen';
import { sendProof } from '../../actions';

type Rung = NonNullable<HearingScreen['rung']>;
type Answer = { played: KeyNumber[]; milliseconds: number | null; byEar: 'right' | 'not_right' | null };
type Source = KeySource | 'ear';
export type Told = { name: string; played: readonly KeyNumber[]; verdict: Verdict | null; byEar: Answer['byEar']; milliseconds: number | null };

/** The course of a hearing on the screen: which key, which chord of it, what was told last. The server keeps the proofs. */
export function useHearing(rung: Rung, underWay: HearingUnderWay) {
  const [tries, setTries] = useState(() => new Map(underWay.tries.map(({ drawnNo, isHeard }) => [drawnNo, isHeard])));
  const [drawnNo, setDrawnNo] = useState(() => nextUnheard(underWay, new Map(underWay.tries.map(({ drawnNo: no, isHeard }) => [no, isHeard])), -1));
  const [answers, setAnswers] = useState<Answer[]>([]);
  const [told, setTold] = useState<Told | null>(null);
  const [problem, setProblem] = useState<string | null>(null);
  const [isSending, setIsSending] = useState(false);
  const askedAt = useRef<number | null>(null);

  // The clock of the first key runs from the moment it stands on the screen.
  useEffect(() => { askedAt.current = performance.now(); }, []);

  const drawn = underWay.drawn[drawnNo];
  const asks = useMemo<Ask[]>(() => (drawn ? asksOf(rung.spec, drawn) : []), [rung.spec, drawn]);
  const chordNo = Math.min(answers.length, Math.max(0, asks.length - 1));
  const ask = asks[chordNo];

  const goTo = useCallback((no: number) => { setDrawnNo(no); setAnswers([]); setTold(null); setProblem(null); askedAt.current = performance.now(); }, []);

  const send = useCallback(async (heard: Answer[], source: Source) => {
    setIsSending(true);
    const result = await sendProof({ hearingId: underWay.id, drawnNo, source, heard }).catch(() => null);
    setIsSending(false);
    setAnswers([]);
    askedAt.current = performance.now();
    if (!result?.ok) return setProblem(result?.message ?? 'This did not reach the school. Check the connection and play it once more.');
    setProblem(null);
    setTries((before) => new Map(before).set(drawnNo, result.data.isHeard));
  }, [underWay.id, drawnNo]);

  const take = useCallback((answer: Answer, source: Source) => {
    if (!ask || isSending) return;
    const verdict = answer.byEar === null ? judgeAsk(ask, answer.played) : null;
    setTold({ name: ask.symbol, played: answer.played, verdict, byEar: answer.byEar, milliseconds: answer.milliseconds });
    const heard = [...answers, answer];
    askedAt.current = performance.now();
    if (heard.length < asks.length) setAnswers(heard);
    else void send(heard, source);
  }, [ask, asks.length, answers, isSending, send]);

  /** Keys put down one by one or rolled are not timed. */
  const takeKeys = useCallback((played: KeyNumber[], lastDownAt: number | null, source: Source) => {
    const isTimed = askedAt.current !== null && lastDownAt !== null;
    take({ played, milliseconds: isTimed ? Math.max(0, Math.round(lastDownAt - (askedAt.current ?? 0))) : null, byEar: null }, source);
  }, [take]);
  const takeByEar = useCallback((byEar: 'right' | 'not_right') => take({ played: [], milliseconds: null, byEar }, 'ear'), [take]);
  const next = useCallback(() => goTo(nextUnheard(underWay, tries, drawnNo)), [goTo, underWay, tries, drawnNo]);
  const isRight = useCallback((keys: KeyNumber[]) => ask !== undefined && judgeAsk(ask, keys).isRight, [ask]);
  const keysHeard = [...tries.values()].filter(Boolean).length;
  return { tries, drawnNo, asks, ask, chordNo, told, problem, isSending, keysHeard, goTo, next, takeKeys, takeByEar, isRight };
}

export type Hearing = ReturnType<typeof useHearing>;

/** The next key that is not heard yet, going round; stays where it is when all are. */
function nextUnheard({ drawn }: HearingUnderWay, tries: ReadonlyMap<number, boolean>, from: number): number {
  for (let step = 1; step <= drawn.length; step += 1) {
    const no = (from + step + drawn.length) % drawn.length;
    if (tries.get(no) !== true) return no;
  }
  return Math.max(0, from);
}
