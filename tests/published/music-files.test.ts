import fc from 'fast-check';
import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { describe, expect, it } from 'vitest';
import { validateXML } from 'xmllint-wasm';
import { chordOf, type Chord } from '@/lib/harmony/chord';
import { semitonesOf } from '@/lib/harmony/degree';
import { midiFile } from '@/lib/harmony/midi-score';
import { fifthsOf, musicXml } from '@/lib/harmony/musicxml';
import { semitonesOfXml, xmlHarmony } from '@/lib/harmony/musicxml-harmony';
import { smoothestVoicings } from '@/lib/harmony/path-finder';
import { chordsOfNumerals, PROGRESSIONS } from '@/lib/harmony/roman';
import type { Score } from '@/lib/harmony/score';

/**
 * Kinds and degrees after the MusicXML schema (W3C, musicxml.xsd: kind-value, degree-alter). Files are checked by
 * libxml2 against the schema in data/musicxml-3.0: the newest that is freely at hand as a whole; every element used
 * here is the same in 4.0.
 */
const KINDS: [string, string, string, number[]][] = [
  ['C', 'major', '', [0, 4, 7]], ['Cm', 'minor', '', [0, 3, 7]], ['Cdim', 'diminished', '', [0, 3, 6]], ['Caug', 'augmented', '', [0, 4, 8]], ['C5', 'power', '', [0, 7]],
  ['C7', 'dominant', '', [0, 4, 7, 10]], ['Cmaj7', 'major-seventh', '', [0, 4, 7, 11]], ['Cm7', 'minor-seventh', '', [0, 3, 7, 10]],
  ['Cm7b5', 'half-diminished', '', [0, 3, 6, 10]], ['Cdim7', 'diminished-seventh', '', [0, 3, 6, 9]], ['Cm(maj7)', 'major-minor', '', [0, 3, 7, 11]], ['C7#5', 'augmented-seventh', '', [0, 4, 8, 10]],
  ['C6', 'major-sixth', '', [0, 4, 7, 9]], ['Cm6', 'minor-sixth', '', [0, 3, 7, 9]], ['C6/9', 'major-sixth', 'add 9 0', [0, 4, 7, 9, 14]],
  ['C9', 'dominant-ninth', '', [0, 4, 7, 10, 14]], ['Cmaj9', 'major-ninth', '', [0, 4, 7, 11, 14]], ['Cm9', 'minor-ninth', '', [0, 3, 7, 10, 14]],
  ['C11', 'dominant-11th', '', [0, 4, 7, 10, 14, 17]], ['Cm11', 'minor-11th', '', [0, 3, 7, 10, 14, 17]],
  ['C13', 'dominant-13th', 'subtract 11 0', [0, 4, 7, 10, 14, 21]], ['Cmaj13', 'major-13th', 'subtract 11 0', [0, 4, 7, 11, 14, 21]],
  ['Csus2', 'suspended-second', '', [0, 2, 7]], ['Csus4', 'suspended-fourth', '', [0, 5, 7]], ['C7sus4', 'suspended-fourth', 'add 7 0', [0, 5, 7, 10]], ['C9sus4', 'suspended-fourth', 'add 7 0, add 9 0', [0, 5, 7, 10, 14]],
  ['C13sus4', 'suspended-fourth', 'add 7 0, add 9 0, add 13 0', [0, 5, 7, 10, 14, 21]],
  ['C7b9', 'dominant', 'add 9 -1', [0, 4, 7, 10, 13]], ['C7#9', 'dominant', 'add 9 1', [0, 4, 7, 10, 15]], ['C7#11', 'dominant', 'add 11 1', [0, 4, 7, 10, 18]], ['C7b13', 'dominant', 'add 13 -1', [0, 4, 7, 10, 20]],
  ['C7b9b13', 'dominant', 'add 9 -1, add 13 -1', [0, 4, 7, 10, 13, 20]], ['C7b5', 'dominant', 'alter 5 -1', [0, 4, 6, 10]],
  ['C7alt', 'dominant', 'alter 5 1, add 9 -1, add 9 1, add 11 1', [0, 4, 8, 10, 13, 15, 18]],
  ['C13#11', 'dominant-13th', 'alter 11 1', [0, 4, 7, 10, 14, 18, 21]], ['Cmaj7#11', 'major-seventh', 'add 11 1', [0, 4, 7, 11, 18]], ['Cmaj9#11', 'major-ninth', 'add 11 1', [0, 4, 7, 11, 14, 18]],
  ['Cmaj7#5', 'major-seventh', 'alter 5 1', [0, 4, 8, 11]], ['Cadd9', 'major', 'add 9 0', [0, 4, 7, 14]],
];

it.each(KINDS)('%s is kind %s with degrees “%s”', (symbol, kind, degrees, semitones) => {
  const written = xmlHarmony(chordOf(symbol));
  expect(written.kind).toBe(kind);
  expect(written.degrees.map(({ type, value, alter }) => `${type} ${value} ${alter}`).join(', ')).toBe(degrees);
  expect(semitonesOfXml(written)).toEqual(semitones);
});

const soundingOf = ({ degrees }: Chord) => degrees.map(semitonesOf).sort((a, b) => a - b);

it('whatever the symbol, a reader of the schema hears the chord that was meant (property, 10,000 cases)', () => {
  const suffix = fc.tuple(fc.constantFrom('', 'm', 'maj7', '7', 'm7', '9', 'm9', 'maj9', '13', 'm11', '6', 'm6', 'm7b5', 'dim7', '7sus4', 'm(maj7)', 'aug'), fc.constantFrom('', 'b9', '#9', '#11', 'b13', 'add9', 'add11', 'no5'));
  const root = fc.tuple(fc.constantFrom(...'ABCDEFG'), fc.constantFrom('', 'b', '#')).map((parts) => parts.join(''));
  fc.assert(fc.property(root, suffix, (letter, [base, tail]) => {
    const chord = readable(letter + base + tail);
    fc.pre(chord !== null);
    if (chord) expect(semitonesOfXml(xmlHarmony(chord))).toEqual(soundingOf(chord));
  }), { numRuns: 10_000 });
});

function readable(symbol: string): Chord | null {
  try { return chordOf(symbol); } catch { return null; }
}

const folder = new URL('./data/musicxml-3.0/', import.meta.url);
const local = (name: string) => readFileSync(new URL(name, folder), 'utf8');
const SCHEMA = local('musicxml.xsd').replace(/http:\/\/www\.musicxml\.org\/xsd\//g, '');

async function complaints(xml: string): Promise<string[]> {
  const { errors } = await validateXML({
    xml: [{ fileName: 'score.xml', contents: xml }], schema: [{ fileName: 'musicxml.xsd', contents: SCHEMA }],
    preload: [{ fileName: 'xlink.xsd', contents: local('xlink.xsd') }, { fileName: 'xml.xsd', contents: local('xml.xsd') }],
  });
  return errors.map(({ message }) => message);
}

const scoreIn = (tonic: string): Score => {
  const chords = chordsOfNumerals(tonic, PROGRESSIONS.turnaround.numerals);
  const path = smoothestVoicings(chords, { forms: ['rootless_a', 'rootless_b'], register: { lowest: 48, highest: 72 } });
  return { title: `Turnaround in ${tonic} <“&”>`, tonic, beatsPerMinute: 96, beatsPerBar: 4, bars: chords.map((chord, at) => ({ chord, notes: path?.voicings[at]?.notes.map(({ note }) => note) ?? [] })) };
};

describe('MusicXML', () => {
  it('a file that the schema takes, in five keys, with every kind of chord, with an empty bar and a slash', async () => {
    const all: Score = { ...scoreIn('C'), bars: [...KINDS.map(([symbol]) => ({ chord: chordOf(symbol), notes: ['Cb4', 'F##4', 'Bbb3'] })), { chord: chordOf('Dm7/G'), notes: [] }] };
    for (const score of [all, ...['C', 'Gb', 'F#', 'Cb', 'Ab'].map(scoreIn)]) expect(await complaints(musicXml(score))).toEqual([]);
  }, 60_000);
  it('the check can fail: a degree before the kind, a kind that is none', async () => {
    const xml = musicXml(scoreIn('C'));
    expect(await complaints(xml.replace('>major-ninth<', '>dominant-seventh<'))).not.toEqual([]);
    expect(await complaints(xml.replace(/(<kind[^>]*>[^<]*<\/kind>)(<degree.*?<\/degree>)/, '$2$1'))).not.toEqual([]);
  });
  it('writes key signatures and spelled notes', () => {
    expect(['C', 'F', 'Gb', 'F#', 'Cb', 'C#', 'G#'].map(fifthsOf)).toEqual([0, -1, -6, 6, -7, 7, 0]);
    expect(musicXml({ ...scoreIn('C'), bars: [{ chord: chordOf('Abm7b5'), notes: ['Ebb4'] }] })).toContain('<pitch><step>E</step><alter>-2</alter><octave>4</octave></pitch>');
  });
});

describe('Standard MIDI file', () => {
  /** An independent reader, not the writer’s own. */
  type Message = { tt: number; isNoteOn: () => boolean; getNote: () => number; isTempo: () => boolean; getBPM: () => number };
  type Reader = (bytes: string) => (Message[])[] & { type: number; ppqn: number };
  const require = createRequire(import.meta.url);
  const JZZ = require('jzz') as { MIDI: { SMF: Reader } };
  (require('jzz-midi-smf') as (jzz: unknown) => void)(JZZ);
  const read = (score: Score) => JZZ.MIDI.SMF(Buffer.from(midiFile(score)).toString('binary'));

  it('is read back by another reader: format, tempo, every key at its beat', () => {
    const score = scoreIn('C');
    const tracks = read(score);
    expect([tracks.type, tracks.ppqn, tracks.length]).toEqual([1, 480, 2]);
    expect(Math.round([...(tracks[0] ?? [])].find((message) => message.isTempo())?.getBPM() ?? 0)).toBe(96);
    const heard = [...(tracks[1] ?? [])].filter((message) => message.isNoteOn()).map((message) => [message.tt / 1920, message.getNote()]);
    expect(heard).toEqual([52, 55, 59, 62, 55, 58, 61, 65, 53, 57, 60, 64, 53, 57, 59, 64, 52, 55, 59, 62].map((key, at) => [Math.floor(at / 4), key]));
  });
  it('keeps the time of an empty bar', () => {
    const one = chordOf('C');
    const tracks = read({ ...scoreIn('C'), bars: [{ chord: one, notes: [] }, { chord: one, notes: ['C4'] }] });
    expect([...(tracks[1] ?? [])].filter((message) => message.isNoteOn()).map(({ tt }) => tt)).toEqual([1920]);
  });
});
