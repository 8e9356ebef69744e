import { writeMidi, type MidiEvent } from 'midi-file';
import { keyOf } from './note';
import type { Score } from './score';

const TICKS_PER_BEAT = 480;
const MICROSECONDS_PER_MINUTE = 60_000_000;
/** Half of the loudest: a file that is opened should not startle. */
const VELOCITY = 64;
const CHANNEL = 0;

/**
 * A practice score as a Standard MIDI File, format 1: tempo, time signature and chord names in the first track, the
 * notes in the second. Key 60 is C4, middle C; some programs print it as C3 or C5.
 */
export function midiFile(score: Score): Uint8Array<ArrayBuffer> {
  const bytes = writeMidi({ header: { format: 1, numTracks: 2, ticksPerBeat: TICKS_PER_BEAT }, tracks: [signsTrack(score), notesTrack(score)] });
  return new Uint8Array(bytes);
}

/** Text in a MIDI file is plain ASCII by the standard’s own advice: flats are written b, sharps #. */
const ascii = (text: string): string => text.replaceAll('♭', 'b').replaceAll('♯', '#').replace(/[^\x20-\x7e]/g, '?');

function signsTrack({ title, beatsPerMinute, beatsPerBar, bars }: Score): MidiEvent[] {
  const barTicks = beatsPerBar * TICKS_PER_BEAT;
  return [
    { deltaTime: 0, type: 'trackName', text: ascii(title) },
    { deltaTime: 0, type: 'setTempo', microsecondsPerBeat: Math.round(MICROSECONDS_PER_MINUTE / beatsPerMinute) },
    { deltaTime: 0, type: 'timeSignature', numerator: beatsPerBar, denominator: 4, metronome: 24, thirtyseconds: 8 },
    ...bars.map(({ chord }, at): MidiEvent => ({ deltaTime: at === 0 ? 0 : barTicks, type: 'marker', text: ascii(chord.root + chord.suffix + (chord.bass ? `/${chord.bass}` : '')) })),
    { deltaTime: barTicks, type: 'endOfTrack' },
  ];
}

function notesTrack({ beatsPerBar, bars }: Score): MidiEvent[] {
  const barTicks = beatsPerBar * TICKS_PER_BEAT;
  let waitingTicks = 0;
  const events: MidiEvent[] = [];
  for (const { notes } of bars) {
    const keys = notes.map(keyOf);
    keys.forEach((noteNumber, at) => events.push({ deltaTime: at === 0 ? waitingTicks : 0, type: 'noteOn', channel: CHANNEL, noteNumber, velocity: VELOCITY }));
    keys.forEach((noteNumber, at) => events.push({ deltaTime: at === 0 ? barTicks : 0, type: 'noteOff', channel: CHANNEL, noteNumber, velocity: 0 }));
    waitingTicks = keys.length > 0 ? 0 : waitingTicks + barTicks;
  }
  return [...events, { deltaTime: waitingTicks, type: 'endOfTrack' }];
}
