'use client';

import { Ear, Usb, Volume2 } from 'lucide-react';
import { useCallback, useMemo, useRef, useState } from 'react';
import { Keyboard } from '@/components/keyboard/keyboard';
import { keyboardRange } from '@/components/keyboard/keyboard-shape';
import { marksOf } from '@/components/keyboard/marks';
import { playKeys } from '@/components/keyboard/sound';
import { useComputerKeys } from '@/components/keyboard/use-computer-keys';
import { useHeldKeys } from '@/components/keyboard/use-held-keys';
import { MIDI_WORDS, useWebMidi } from '@/components/keyboard/use-web-midi';
import { Button } from '@/components/ui/button';
import { Chip } from '@/components/ui/chip';
import { Checkbox } from '@/components/ui/inputs';
import type { KeyNumber } from '@/lib/harmony/note';
import type { Ask } from '@/lib/ladder/asks';
import { useChordCapture } from './use-chord-capture';

/** How the keys came in. */
export type KeySource = 'midi' | 'screen';
type PlayAreaProps = {
  ask: Ask;
  /** Whether the asked keys are marked. */
  isShown: boolean;
  isBusy: boolean;
  isRight: (keys: KeyNumber[]) => boolean;
  /** @param lastDownAt milliseconds on the browser's steady clock; null when keys were put down one by one */
  onKeys: (keys: KeyNumber[], lastDownAt: number | null, source: KeySource) => void;
};

/** The keyboard: MIDI, letter keys, mouse or finger. Keys can be kept down one by one and then heard together. */
export function PlayArea({ ask, isShown, isBusy, isRight, onKeys }: PlayAreaProps) {
  const [isLatched, setIsLatched] = useState(false);
  const { held, down, up, clear } = useHeldKeys(isLatched);
  const source = useRef<KeySource>('screen');
  const range = useMemo(() => keyboardRange(ask.shown.notes.map(({ key }) => key)), [ask]);
  const marks = useMemo(() => marksOf(ask.shown.notes), [ask]);
  const base = Math.max(range.lowest, Math.min(60, range.highest - 16));

  const midiDown = useCallback((key: KeyNumber) => { source.current = 'midi'; down(key); }, [down]);
  const screenDown = useCallback((key: KeyNumber) => { source.current = 'screen'; down(key); }, [down]);
  const { status, switchOn } = useWebMidi({ onDown: midiDown, onUp: up });
  useComputerKeys({ base, isOn: true, onDown: screenDown, onUp: up });

  const onChord = useCallback((keys: KeyNumber[], lastDownAt: number) => { onKeys(keys, isLatched ? null : lastDownAt, source.current); if (isLatched) clear(); }, [onKeys, isLatched, clear]);
  useChordCapture({ held, isLatched, isOn: !isBusy, isRight, onChord });

  return (
    <div className="mt-2 grid gap-2">
      <div className="flex flex-wrap items-center gap-2">
        <Chip tone={status === 'listening' ? 'info' : status === 'refused' ? 'bad' : 'neutral'} icon={<Usb size={13} aria-hidden />}>{MIDI_WORDS[status]}</Chip>
        {status === 'off' || status === 'refused' ? <Button kind="quiet" onClick={switchOn}>Switch MIDI on</Button> : null}
        {ask.shown.notes.length > 0 ? <Button kind="quiet" icon={<Volume2 size={16} aria-hidden />} onClick={() => void playKeys(ask.shown.notes.map(({ key }) => key))}>Play it softly</Button> : null}
      </div>
      <Keyboard {...range} label="Keyboard. Arrows move, Space plays." held={held} {...(isShown ? { marks } : {})} onDown={screenDown} onUp={up} />
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
        <Checkbox label="Keep keys down: one finger, or rolled, without the clock" checked={isLatched} onChange={(event) => { clear(); setIsLatched(event.target.checked); }} />
        {isLatched ? <Button kind="primary" icon={<Ear size={16} aria-hidden />} disabled={held.size === 0 || isBusy} onClick={() => onChord([...held], performance.now())}>{`Hear these ${held.size || ''} keys`.replace('  ', ' ')}</Button> : null}
      </div>
    </div>
  );
}
