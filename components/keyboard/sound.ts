import { frequencyOf, type KeyNumber } from '@/lib/harmony/note';

/** Quiet on purpose: with headphones a default must never be loud, and it is never raised by itself. */
const LOUDNESS = 0.12;
const LENGTH_SECONDS = 2.4;
const ATTACK_SECONDS = 0.02;
/** A few partials of a struck string, each weaker than the one before. */
const PARTIALS = [1, 0.42, 0.22, 0.1, 0.05];

let shared: AudioContext | null = null;
let current: GainNode | null = null;

/** Lets a voicing be heard, softly, made on the spot from sine waves. Does nothing where sound is not possible. */
export const playKeys = (keys: readonly KeyNumber[]): Promise<void> => playInTime([keys], 0);

/** Chords one after the other, so many seconds apart. Pressed again it begins anew instead of sounding twice. */
export async function playInTime(chords: readonly (readonly KeyNumber[])[], secondsApart: number): Promise<void> {
  if (typeof AudioContext === 'undefined') return;
  const audio = (shared ??= new AudioContext());
  await audio.resume();
  current?.disconnect();
  const out = (current = audio.createGain());
  out.connect(audio.destination);
  const begin = audio.currentTime + 0.01;
  chords.forEach((keys, at) => {
    const chord = audio.createGain();
    chord.gain.value = LOUDNESS / Math.sqrt(Math.max(1, keys.length));
    chord.connect(out);
    for (const key of keys) soundKey(audio, chord, { key, start: begin + at * secondsApart });
  });
}

function soundKey(audio: AudioContext, out: AudioNode, { key, start }: { key: KeyNumber; start: number }): void {
  PARTIALS.forEach((strength, at) => {
    const oscillator = audio.createOscillator();
    const envelope = audio.createGain();
    oscillator.frequency.value = frequencyOf(key) * (at + 1);
    envelope.gain.setValueAtTime(0, start);
    envelope.gain.linearRampToValueAtTime(strength, start + ATTACK_SECONDS);
    envelope.gain.exponentialRampToValueAtTime(0.0001, start + LENGTH_SECONDS / (at + 1));
    oscillator.connect(envelope).connect(out);
    oscillator.start(start);
    oscillator.stop(start + LENGTH_SECONDS);
  });
}
