'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import type { HearingScreen } from '@/lib/ladder/server/hearing-screen';
import { DecideDialog } from './decide-dialog';
import { StopDialog } from './stop-dialog';

type EarPanelProps = { hearingId: string; rung: NonNullable<HearingScreen['rung']>; keysHeard: number; student: HearingScreen['ladder']['student'] };

/** The decision is the teacher's: the keys are the proof, the ear has the last word. */
export function EarPanel({ hearingId, rung, keysHeard, student }: EarPanelProps) {
  const [asked, setAsked] = useState<'passed' | 'not_yet' | 'stop' | null>(null);
  const isEnough = keysHeard >= rung.keysNeeded;
  const close = () => setAsked(null);
  return (
    <section className="sheet px-4 py-[14px]" aria-label="Teacher's ear">
      <p className="eyebrow">Teacher’s ear</p>
      <p className="mt-[6px] text-small">{rung.criteria.listenFor}{rung.criteria.tempo ? ` ${rung.criteria.tempo.beatsPerMinute} beats a minute, ${rung.criteria.tempo.beatsPerChord} to a chord.` : ''}</p>
      <div className="mt-[10px] grid gap-2">
        <Button kind={isEnough ? 'brass' : 'plain'} onClick={() => setAsked('passed')}>{isEnough ? 'Pass the rung' : 'Pass with a reason'}</Button>
        <Button onClick={() => setAsked('not_yet')}>Not yet, with a note</Button>
        <Button kind="quiet" onClick={() => setAsked('stop')}>Stop, no attempt counted</Button>
      </div>
      {isEnough ? null : <p className="mt-[10px] text-small text-ink-3">{`The plain pass opens when ${rung.keysNeeded} are heard.`}</p>}
      {asked === 'passed' || asked === 'not_yet' ? <DecideDialog hearingId={hearingId} outcome={asked} rung={rung} keysHeard={keysHeard} firstName={student.firstName} onClose={close} /> : null}
      {asked === 'stop' ? <StopDialog hearingId={hearingId} onClose={close} /> : null}
    </section>
  );
}
