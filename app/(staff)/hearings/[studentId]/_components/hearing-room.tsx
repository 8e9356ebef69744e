'use client';

import { useEffect, useState } from 'react';
import type { HearingScreen, HearingUnderWay } from '@/lib/ladder/server/hearing-screen';
import { isSpoken } from '@/lib/ladder/play-spec';
import { AskPanel } from './ask-panel';
import { EarPanel } from './ear-panel';
import { HandsPanel } from './hands-panel';
import { KeysHeard } from './keys-heard';
import { useHearing } from './use-hearing';

type HearingRoomProps = { screen: HearingScreen; rung: NonNullable<HearingScreen['rung']>; underWay: HearingUnderWay };

/** After a right key the next one comes by itself, so that the teacher's hands stay free. */
const GO_ON_MILLISECONDS = 1600;

export function HearingRoom({ screen, rung, underWay }: HearingRoomProps) {
  const hearing = useHearing(rung, underWay);
  const [goesOn, setGoesOn] = useState(true);
  const { tries, drawnNo, next, keysHeard, isSending, told } = hearing;
  const isDone = keysHeard >= underWay.drawn.length;
  const isReadyToGoOn = goesOn && !isSending && told !== null && tries.get(drawnNo) === true && !isDone;
  useEffect(() => {
    if (!isReadyToGoOn) return;
    const timer = setTimeout(next, GO_ON_MILLISECONDS);
    return () => clearTimeout(timer);
  }, [isReadyToGoOn, next]);
  return (
    <div className="grid min-w-0 items-start gap-4 lg:grid-cols-[minmax(0,1fr)_250px] xl:gap-[18px]">
      <AskPanel hearing={hearing} rung={rung} chordStyle={screen.chordStyle} goesOn={goesOn} onGoesOn={setGoesOn} />
      <div className="grid gap-[14px]">
        <KeysHeard hearing={hearing} rung={rung} drawn={underWay.drawn} chordStyle={screen.chordStyle} />
        <EarPanel hearingId={underWay.id} rung={rung} keysHeard={keysHeard} student={screen.ladder.student} />
        {isSpoken(rung.spec.how) ? null : <HandsPanel ask={hearing.ask} reachSemitones={screen.ladder.student.reachSemitones} />}
      </div>
    </div>
  );
}
