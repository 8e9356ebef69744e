import { Note } from 'tonal';
import { chordOf, readSymbol, type Chord } from './chord';
import type { NoteName } from './note';
import { plainSigns } from './symbol-signs';

const NUMERALS = ['I', 'II', 'III', 'IV', 'V', 'VI', 'VII'];
/** Semitones are never enough: a flat six keeps the letter of the six. */
const STEPS = ['1P', '2M', '3M', '4P', '5P', '6M', '7M'];
const NUMERAL = /^([b#]?)(VII|VI|IV|V|III|II|I|vii|vi|iv|v|iii|ii|i)(?![IVXivx])(.*)$/;

/** "IIm7" or "ii7" in a key, as a chord; or one sentence on what is wrong. */
export type RomanReading = { kind: 'chord'; chord: Chord } | { kind: 'refused'; message: string };

/**
 * A chord by its place in the major key of `tonic`. Capital letters are as the sign behind them says; small letters
 * stand for a minor third: "ii7" is "IIm7". A flat or sharp before the numeral alters the root: bII in C is Db.
 * Common practice, no source.
 */
export function chordByNumeral(tonic: NoteName, typed: string): RomanReading {
  const found = NUMERAL.exec(plainSigns(typed));
  if (!found) return { kind: 'refused', message: `“${typed}” is not a step of the scale. Write for example IIm7, V7 or bII7.` };
  const [, sign = '', numeral = '', suffix = ''] = found;
  const step = STEPS[NUMERALS.indexOf(numeral.toUpperCase())] ?? '1P';
  const root = altered(Note.transpose(tonic, step), sign);
  const reading = readSymbol(root + minorised(suffix, numeral !== numeral.toUpperCase()));
  if (reading.kind === 'chord') return reading;
  return { kind: 'refused', message: reading.kind === 'refused' ? reading.message : `“${typed}” is not a chord.` };
}

/** Small letters say minor, unless the sign behind them says diminished, half-diminished or minor already. */
const minorised = (suffix: string, isSmall: boolean): string => (isSmall && !/^(m(?!aj)|-|dim|°|o|ø)/.test(suffix) ? `m${suffix.startsWith('maj') ? `(${suffix})` : suffix}` : suffix);

/** A sign before the numeral flattens or sharpens; an opposite accidental of the letter is taken away first. */
function altered(root: NoteName, sign: string): NoteName {
  if (sign === 'b') return root.includes('#') ? root.replace('#', '') : `${root}b`;
  if (sign === '#') return root.includes('b') ? root.replace('b', '') : `${root}#`;
  return root;
}

/** For the product's own progressions: a wrong numeral is a fault of ours. */
export function chordsOfNumerals(tonic: NoteName, numerals: readonly string[]): Chord[] {
  return numerals.map((numeral) => {
    const reading = chordByNumeral(tonic, numeral);
    if (reading.kind === 'refused') throw new Error(reading.message);
    return reading.chord;
  });
}

/**
 * The dominant a tritone away shares third and seventh: Db7 for G7 (Music Theory for the 21st-Century Classroom,
 * "Tritone substitution"). Spelled a diminished fifth up, so that it resolves down by a half step in letters too.
 */
export const tritoneSubstitute = ({ root, suffix }: Chord): Chord => chordOf(Note.transpose(root, '5d') + suffix);

/** Progressions every student of the school meets, by numerals of the major key. */
export const PROGRESSIONS = {
  two_five_one: { name: 'Two-five-one', numerals: ['IIm9', 'V13', 'Imaj9'] },
  minor_two_five_one: { name: 'Minor two-five-one', numerals: ['IIm7b5', 'V7b9b13', 'Im6/9'] },
  substituted: { name: 'Two-five-one with the tritone substitute', numerals: ['IIm9', 'bII13', 'Imaj9'] },
  turnaround: { name: 'Turnaround', numerals: ['Imaj9', 'VI7b9b13', 'IIm9', 'V13', 'Imaj9'] },
  dominant_turnaround: { name: 'Turnaround of dominants', numerals: ['III7', 'VI7', 'II7', 'V7'] },
  substituted_dominants: { name: 'Dominants with every second one substituted', numerals: ['III7', 'bIII7', 'II7', 'bII7'] },
  blues: { name: 'Twelve-bar blues', numerals: ['I7', 'IV7', 'I7', 'I7', 'IV7', 'IV7', 'I7', 'VI7b9b13', 'IIm9', 'V13', 'I7', 'V13'] },
} as const;
export type ProgressionName = keyof typeof PROGRESSIONS;
