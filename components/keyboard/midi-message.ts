import type { KeyNumber } from '@/lib/harmony/note';

const NOTE_OFF = 0x80;
const NOTE_ON = 0x90;

/** Note on and note off of any channel; "on" with velocity 0 is an off. Everything else (pedal, clock) is null. */
export function readMidiMessage(data: Uint8Array): { kind: 'down' | 'up'; key: KeyNumber } | null {
  const [status = 0, key, velocity = 0] = data;
  if (key === undefined || key > 127) return null;
  const kind = status & 0xf0;
  if (kind === NOTE_ON) return { kind: velocity > 0 ? 'down' : 'up', key };
  return kind === NOTE_OFF ? { kind: 'up', key } : null;
}
