'use client';

import { useCallback, useEffect, useRef, useState } from 'react';
import type { KeyNumber } from '@/lib/harmony/note';
import { readMidiMessage } from './midi-message';

/** `none`: allowed, and nothing is plugged in. Plugging in later is noticed. */
export type MidiStatus = 'unsupported' | 'off' | 'asking' | 'none' | 'listening' | 'refused';

export const MIDI_WORDS: Record<MidiStatus, string> = {
  unsupported: 'MIDI: not in this browser', off: 'MIDI: off', asking: 'MIDI: asking', none: 'MIDI: nothing plugged in', listening: 'MIDI: listening', refused: 'MIDI: not allowed',
};

type Handlers = { onDown: (key: KeyNumber) => void; onUp: (key: KeyNumber) => void };

/** Listens to every MIDI keyboard of the machine once the person has switched it on. */
export function useWebMidi({ onDown, onUp }: Handlers): { status: MidiStatus; switchOn: () => void } {
  const [status, setStatus] = useState<MidiStatus>('off');
  const access = useRef<MIDIAccess | null>(null);
  const handlers = useRef({ onDown, onUp });
  useEffect(() => { handlers.current = { onDown, onUp }; }, [onDown, onUp]);

  const listen = useCallback(() => {
    const inputs = [...(access.current?.inputs.values() ?? [])].filter(({ state }) => state === 'connected');
    for (const input of inputs) {
      input.onmidimessage = ({ data }) => {
        const message = data && readMidiMessage(data);
        if (message) handlers.current[message.kind === 'down' ? 'onDown' : 'onUp'](message.key);
      };
    }
    setStatus(inputs.length > 0 ? 'listening' : 'none');
  }, []);

  const switchOn = useCallback(() => {
    if (!('requestMIDIAccess' in navigator)) return setStatus('unsupported');
    setStatus('asking');
    navigator.requestMIDIAccess().then((granted) => {
      access.current = granted;
      granted.onstatechange = listen;
      listen();
    }, () => setStatus('refused'));
  }, [listen]);

  useEffect(() => () => {
    for (const input of access.current?.inputs.values() ?? []) input.onmidimessage = null;
    if (access.current) access.current.onstatechange = null;
  }, []);
  return { status, switchOn };
}
