import { Note } from 'tonal';
import { keyOf, type KeyNumber, type NoteName } from './note';
import { harmonyElement, xmlPitch } from './musicxml-harmony';
import type { Score, ScoreBar } from './score';

const MIDDLE_C: KeyNumber = 60;
const DIVISIONS = 1;

/**
 * A practice score as a MusicXML 4.0 file (W3C): one part for a keyboard on two staves, a chord symbol and a chord a
 * bar, middle C and above in the upper stave. Notes carry the engine’s own spelling.
 */
export function musicXml(score: Score): string {
  const bars = score.bars.map((bar, at) => `    <measure number="${at + 1}">\n${at === 0 ? attributesOf(score) : ''}${barOf(bar, score.beatsPerBar)}    </measure>\n`);
  return `<?xml version="1.0" encoding="UTF-8" standalone="no"?>
<!DOCTYPE score-partwise PUBLIC "-//Recordare//DTD MusicXML 4.0 Partwise//EN" "http://www.musicxml.org/dtds/partwise.dtd">
<score-partwise version="4.0">
  <work><work-title>${escaped(score.title)}</work-title></work>
  <part-list><score-part id="P1"><part-name>Keyboard</part-name></score-part></part-list>
  <part id="P1">
${bars.join('')}  </part>
</score-partwise>
`;
}

const SIGNS: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&apos;' };
/** Control characters have no place in an XML 1.0 file, not even escaped. */
const escaped = (text: string): string => text.replace(/[\u0000-\u0008\u000b\u000c\u000e-\u001f\ufffe\uffff]/g, '').replace(/[&<>"']/g, (sign) => SIGNS[sign] ?? sign);

/** Sharps (positive) or flats (negative) of a major key; a key with double accidentals is written without signature. */
export function fifthsOf(tonic: NoteName): number {
  const { letter, alt } = Note.get(tonic);
  const plain = { F: -1, C: 0, G: 1, D: 2, A: 3, E: 4, B: 5 }[letter as 'C'] ?? 0;
  const fifths = plain + 7 * alt;
  return Math.abs(fifths) <= 7 ? fifths : 0;
}

const attributesOf = ({ tonic, beatsPerBar, beatsPerMinute }: Score): string =>
  `      <attributes><divisions>${DIVISIONS}</divisions><key><fifths>${fifthsOf(tonic)}</fifths></key><time><beats>${beatsPerBar}</beats><beat-type>4</beat-type></time>`
  + '<staves>2</staves><clef number="1"><sign>G</sign><line>2</line></clef><clef number="2"><sign>F</sign><line>4</line></clef></attributes>\n'
  + `      <direction placement="above"><direction-type><metronome><beat-unit>quarter</beat-unit><per-minute>${beatsPerMinute}</per-minute></metronome></direction-type><sound tempo="${beatsPerMinute}"/></direction>\n`;

function barOf({ chord, notes }: ScoreBar, beats: number): string {
  const sorted = [...notes].sort((a, b) => keyOf(a) - keyOf(b));
  const upper = sorted.filter((note) => keyOf(note) >= MIDDLE_C);
  const lower = sorted.filter((note) => keyOf(note) < MIDDLE_C);
  return `      ${harmonyElement(chord)}\n${staffOf(upper, 1, beats)}      <backup><duration>${beats * DIVISIONS}</duration></backup>\n${staffOf(lower, 2, beats)}`;
}

const TYPES: Record<number, string> = { 1: '<type>quarter</type>', 2: '<type>half</type>', 3: '<type>half</type><dot/>', 4: '<type>whole</type>' };

function staffOf(notes: readonly NoteName[], staff: number, beats: number): string {
  const rest = (pitch: string, isChord: boolean) =>
    `      <note>${isChord ? '<chord/>' : ''}${pitch}<duration>${beats * DIVISIONS}</duration><voice>${staff}</voice>${TYPES[beats] ?? ''}<staff>${staff}</staff></note>\n`;
  if (notes.length === 0) return rest('<rest measure="yes"/>', false);
  return notes.map((note, at) => rest(pitchOf(note), at > 0)).join('');
}

function pitchOf(note: NoteName): string {
  const { step, alter, octave } = xmlPitch(note);
  return `<pitch><step>${step}</step>${alter === 0 ? '' : `<alter>${alter}</alter>`}<octave>${octave}</octave></pitch>`;
}
