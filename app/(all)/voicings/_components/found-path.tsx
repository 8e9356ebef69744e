'use client';

import { Download, Volume2 } from 'lucide-react';
import { useState } from 'react';
import { Keyboard } from '@/components/keyboard/keyboard';
import { keyboardRange } from '@/components/keyboard/keyboard-shape';
import { marksOf } from '@/components/keyboard/marks';
import { playKeys, playInTime } from '@/components/keyboard/sound';
import { ChordRow } from '@/components/stave/chord-row';
import { Button, buttonClass } from '@/components/ui/button';
import { PrintButton } from '@/components/ui/print-button';
import { Sheet } from '@/components/ui/sheet';
import type { FoundVoicing } from '@/lib/ladder/voicing-finder';

type FoundPathProps = { voicings: readonly FoundVoicing[]; tempo: number; fileQuery: string };
const NO_KEYS: ReadonlySet<number> = new Set();
const BEATS_A_CHORD = 4;

/** The path on the stave, and one chord of it in full: its keys, its form, and where each voice came from. */
export function FoundPath({ voicings, tempo, fileQuery }: FoundPathProps) {
  const [at, setAt] = useState(0);
  const shown = voicings[Math.min(at, voicings.length - 1)];
  if (!shown) return null;
  const range = keyboardRange(voicings.flatMap(({ keys }) => keys));
  return (
    <div className="grid min-w-0 gap-4">
      <Sheet action={<Tools voicings={voicings} tempo={tempo} fileQuery={fileQuery} />} eyebrow="The way">
        <ChordRow chords={voicings} label="The smoothest way" />
      </Sheet>
      <Sheet eyebrow="Chord by chord">
        <ol className="no-print flex flex-wrap gap-1">
          {voicings.map(({ name }, no) => (
            <li key={no}><button type="button" aria-pressed={no === at} onClick={() => { setAt(no); void playKeys(voicings[no]?.keys ?? []); }} className={`rounded border px-2 py-1 font-semibold tap ${no === at ? 'border-brass-fill bg-brass-wash' : 'border-rule-strong bg-sheet hover:bg-wash'}`}>{name}</button></li>
          ))}
        </ol>
        <div aria-live="polite" className="mt-3">
          <p><b className="font-display text-h2">{shown.name}</b> <span className="text-ink-3">{`${shown.form}: ${shown.degrees}`}</span></p>
          <ul className="mt-1">{shown.moves.map((move) => <li key={move}>{move}</li>)}</ul>
          {shown.seventh ? <p className="mt-1 text-ink-2">{shown.seventh}</p> : null}
          {shown.moves.length > 0 ? <p className="num mt-1 text-small text-ink-3">{`${shown.movedSemitones} half steps in all.${shown.hasParallels ? ' Two voices move in parallel; usual in this style, a fault only in strict four-part writing.' : ''}`}</p> : null}
        </div>
        <div className="mt-3"><Keyboard {...range} label={`Keys of ${shown.name}`} held={NO_KEYS} marks={marksOf(shown.voiced)} /></div>
      </Sheet>
    </div>
  );
}

function Tools({ voicings, tempo, fileQuery }: FoundPathProps) {
  return (
    <div className="no-print flex flex-wrap justify-end gap-2">
      <Button icon={<Volume2 size={16} aria-hidden />} onClick={() => void playInTime(voicings.map(({ keys }) => keys), (60 / tempo) * BEATS_A_CHORD)}>Play it softly</Button>
      <PrintButton />
      <a href={`/api/voicings?${fileQuery}&as=musicxml`} download className={buttonClass('quiet')}><Download size={16} aria-hidden />MusicXML</a>
      <a href={`/api/voicings?${fileQuery}&as=midi`} download className={buttonClass('quiet')}><Download size={16} aria-hidden />MIDI</a>
    </div>
  );
}
