import type { Chord } from './chord';
import { chordName } from './chord-name';
import { semitonesOf, type Degree } from './degree';
import type { NoteName } from './note';

/**
 * Chord symbols as MusicXML 4.0 writes them (W3C, musicxml.xsd: kind-value, degree): a kind, and degrees that are
 * added, altered or taken away. An added degree counts its alteration from a dominant chord, so that an added 7 is a
 * minor seventh; an altered one counts from the kind.
 */
export type XmlDegree = { value: number; alter: number; type: 'add' | 'alter' | 'subtract' };
export type XmlHarmony = { kind: string; degrees: XmlDegree[] };

/** Semitones above the root of each kind, by degree number. */
const KINDS: Record<string, Record<number, number>> = {
  power: { 1: 0, 5: 7 }, major: { 1: 0, 3: 4, 5: 7 }, minor: { 1: 0, 3: 3, 5: 7 }, diminished: { 1: 0, 3: 3, 5: 6 }, augmented: { 1: 0, 3: 4, 5: 8 },
  'suspended-second': { 1: 0, 2: 2, 5: 7 }, 'suspended-fourth': { 1: 0, 4: 5, 5: 7 },
  'major-sixth': { 1: 0, 3: 4, 5: 7, 6: 9 }, 'minor-sixth': { 1: 0, 3: 3, 5: 7, 6: 9 },
  dominant: { 1: 0, 3: 4, 5: 7, 7: 10 }, 'major-seventh': { 1: 0, 3: 4, 5: 7, 7: 11 }, 'minor-seventh': { 1: 0, 3: 3, 5: 7, 7: 10 }, 'major-minor': { 1: 0, 3: 3, 5: 7, 7: 11 },
  'half-diminished': { 1: 0, 3: 3, 5: 6, 7: 10 }, 'diminished-seventh': { 1: 0, 3: 3, 5: 6, 7: 9 }, 'augmented-seventh': { 1: 0, 3: 4, 5: 8, 7: 10 },
  'dominant-ninth': { 1: 0, 3: 4, 5: 7, 7: 10, 9: 14 }, 'major-ninth': { 1: 0, 3: 4, 5: 7, 7: 11, 9: 14 }, 'minor-ninth': { 1: 0, 3: 3, 5: 7, 7: 10, 9: 14 },
  'dominant-11th': { 1: 0, 3: 4, 5: 7, 7: 10, 9: 14, 11: 17 }, 'major-11th': { 1: 0, 3: 4, 5: 7, 7: 11, 9: 14, 11: 17 }, 'minor-11th': { 1: 0, 3: 3, 5: 7, 7: 10, 9: 14, 11: 17 },
  'dominant-13th': { 1: 0, 3: 4, 5: 7, 7: 10, 9: 14, 11: 17, 13: 21 }, 'major-13th': { 1: 0, 3: 4, 5: 7, 7: 11, 9: 14, 11: 17, 13: 21 }, 'minor-13th': { 1: 0, 3: 3, 5: 7, 7: 10, 9: 14, 11: 17, 13: 21 },
};

/** What an added degree is without an alteration: as in a dominant chord, the others as in a major scale. */
const ADDED: Record<number, number> = { 2: 2, 4: 5, 5: 7, 6: 9, 7: 10, 9: 14, 11: 17, 13: 21 };

const numberOf = (degree: Degree): number => Number(degree.replace(/[b#]/g, ''));

/** The altered chord has no one set of colours; the schema’s reader is given the usual four. */
const ALT: XmlHarmony = { kind: 'dominant', degrees: [{ value: 5, alter: 1, type: 'alter' }, { value: 9, alter: -1, type: 'add' }, { value: 9, alter: 1, type: 'add' }, { value: 11, alter: 1, type: 'add' }] };

export function xmlHarmony(chord: Chord): XmlHarmony {
  if (chord.isAlt) return ALT;
  const kind = kindOf(chord.degrees);
  const left = new Map(Object.entries(KINDS[kind] ?? {}).map(([value, semitones]) => [Number(value), semitones]));
  const degrees: XmlDegree[] = [];
  for (const degree of chord.degrees) {
    const [value, semitones] = [numberOf(degree), semitonesOf(degree)];
    const inKind = left.get(value);
    left.delete(value);
    if (inKind === undefined) degrees.push({ value, alter: semitones - (ADDED[value] ?? semitones), type: 'add' });
    else if (inKind !== semitones) degrees.push({ value, alter: semitones - inKind, type: 'alter' });
  }
  return { kind, degrees: [...degrees, ...[...left.keys()].map((value): XmlDegree => ({ value, alter: 0, type: 'subtract' }))] };
}

type Has = (degree: Degree) => boolean;

function kindOf(degrees: readonly Degree[]): string {
  const has: Has = (degree) => degrees.includes(degree);
  if (has('4')) return 'suspended-fourth';
  if (has('2')) return 'suspended-second';
  if (!has('3') && !has('b3')) return 'power';
  return sixthOrSeventh(has, topOf(degrees));
}

/** "ninth", "11th" or "13th" when the tensions up to it stand on a seventh; the natural 11 of a thirteenth is taken away again. */
function topOf(degrees: readonly Degree[]): string {
  const has: Has = (degree) => degrees.includes(degree);
  const hasAnyNinth = has('9') || has('b9') || has('#9');
  if (has('13') && hasAnyNinth) return '13th';
  if (has('9') && has('11')) return '11th';
  return has('9') ? 'ninth' : '';
}

function sixthOrSeventh(has: Has, top: string): string {
  const isMinor = has('b3');
  if (has('6')) return isMinor ? 'minor-sixth' : 'major-sixth';
  if (has('bb7')) return 'diminished-seventh';
  if (has('7')) return isMinor ? 'major-minor' : `major-${top || 'seventh'}`;
  if (has('b7')) return dominantOrMinor(has, top);
  return triadOf(has);
}

function dominantOrMinor(has: Has, top: string): string {
  if (has('b3') && has('b5')) return 'half-diminished';
  if (top !== '') return `${has('b3') ? 'minor' : 'dominant'}-${top}`;
  if (has('b3')) return 'minor-seventh';
  return has('#5') ? 'augmented-seventh' : 'dominant';
}

function triadOf(has: Has): string {
  if (has('b3')) return has('b5') ? 'diminished' : 'minor';
  return has('#5') ? 'augmented' : 'major';
}

/** Semitones above the root that a reader of the schema makes of it: to check what was written. */
export function semitonesOfXml({ kind, degrees }: XmlHarmony): number[] {
  const sounding = new Map(Object.entries(KINDS[kind] ?? {}).map(([value, semitones]) => [value, semitones]));
  for (const [at, { value, alter, type }] of degrees.entries()) {
    if (type === 'add') sounding.set(`${value} ${at}`, (ADDED[value] ?? 0) + alter);
    if (type === 'alter') sounding.set(String(value), (sounding.get(String(value)) ?? 0) + alter);
    if (type === 'subtract') sounding.delete(String(value));
  }
  return [...sounding.values()].sort((a, b) => a - b);
}

const alterOf = (signs: string): number => (signs.startsWith('b') ? -signs.length : signs.length);
/** Letter, accidental in semitones, octave. */
export function xmlPitch(note: NoteName): { step: string; alter: number; octave: string } {
  const [, step = 'C', signs = '', octave = ''] = /^([A-G])(b*|#*)(-?\d*)$/.exec(note) ?? [];
  return { step, alter: alterOf(signs), octave };
}

const tag = (name: string, note: NoteName): string => {
  const { step, alter } = xmlPitch(note);
  return `<${name}><${name}-step>${step}</${name}-step>${alter === 0 ? '' : `<${name}-alter>${alter}</${name}-alter>`}</${name}>`;
};

/** The whole symbol is printed by the kind’s text; the degrees only tell a program, or some readers print them twice. */
export function harmonyElement(chord: Chord): string {
  const { kind, degrees } = xmlHarmony(chord);
  const shown = chordName({ root: 'C', bass: null, suffix: chord.suffix }).slice(1);
  const parts = degrees.map(({ value, alter, type }) =>
    `<degree print-object="no"><degree-value>${value}</degree-value><degree-alter>${alter}</degree-alter><degree-type text="">${type}</degree-type></degree>`);
  return `<harmony>${tag('root', chord.root)}<kind text="${shown}">${kind}</kind>${chord.bass ? tag('bass', chord.bass) : ''}${parts.join('')}</harmony>`;
}
