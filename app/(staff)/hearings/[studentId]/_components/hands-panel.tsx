import { handsSentence, splitHands } from '@/lib/harmony/hands';
import { reachWords } from '@/lib/harmony/reach';
import type { Ask } from '@/lib/ladder/asks';

const CAUTION = 'Stop if a stretch hurts; re-spread the voicing instead.';

/** How the voicing lies in this student's hands. */
export function HandsPanel({ ask, reachSemitones }: { ask: Ask | undefined; reachSemitones: number }) {
  const notes = ask?.shown.notes ?? [];
  const fifth = notes.find(({ degree }) => degree === '5')?.key;
  const text = notes.length === 0 ? `Any spacing that lies well. ${CAUTION}` : handsSentence(splitHands(notes.map(({ key }) => key), reachSemitones, fifth));
  return (
    <section className="sheet px-4 py-[14px]" aria-label="Hands">
      <p className="eyebrow">Hands</p>
      <p className="mt-[6px] text-small">{text}</p>
      <p className="mt-1 text-small text-ink-3">{`Comfortable reach noted for this student: ${reachWords(reachSemitones)}.`}</p>
    </section>
  );
}
