import { midiFile } from '../harmony/midi-score';
import { musicXml } from '../harmony/musicxml';
import type { Score } from '../harmony/score';

export const SCORE_KINDS = ['musicxml', 'midi'] as const;
export type ScoreKind = (typeof SCORE_KINDS)[number];

/** A score in an open format: MusicXML 4.0, or a Standard MIDI File. */
export const scoreContent = (score: Score, kind: ScoreKind): string | Uint8Array<ArrayBuffer> => (kind === 'midi' ? midiFile(score) : musicXml(score));
