import { frequencyOf, type KeyNumber } from '@/lib/harmony/note';

/** Quiet on purpose: with headphones a default must never be loud, and it is never raised by itself. */
const LOUDNESS = 0.12;
const LENGTH_SECONDS = 2.4;
const ATTACK_SECONDS = 0.02;
/** A few partials of a struck string, each weaker than the one before. */
const PARTIALS = [1, 0.42, 0.22, 0.1, 0.05];

let shared: AudioContext | null = null;

/** Lets a voicing be heard, softly, made on the spot from sine waves. Does nothing where sound is not possible. */
export async function playKeys(keys: readonly KeyNumber[]): Promise<void> {
  if (typeof AudioContext === 'undefined' || keys.length === 0) return;
  const audio = (shared ??= new AudioContext());
  await audio.resume();
  const out = audio.createGain();
  out.gain.value = LOUDNESS / Math.sqrt(keys.length);
  out.connect(audio.destination);
  const start = audio.currentTime + 0.01;
  for (const key of keys) soundKey(audio, out, { key, start });
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
