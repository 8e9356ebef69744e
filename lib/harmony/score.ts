import type { Chord } from './chord';
import type { NoteName } from './note';

/** One bar of a practice score: a chord symbol and its notes from the bottom up; no notes is a bar of rest. */
export type ScoreBar = { chord: Chord; notes: readonly NoteName[] };

/** A practice score: what is written to the stave, to a MusicXML file and to a MIDI file alike. */
export type Score = {
  title: string;
  /** The major key whose signature stands at the front. */
  tonic: NoteName;
  beatsPerMinute: number;
  /** Quarter notes to a bar; each bar holds one chord. */
  beatsPerBar: number;
  bars: readonly ScoreBar[];
};
