import type { Chord } from './chord';
import { printedNote } from './note';

/** How the school writes chord symbols: in words (Cmaj7, Cm7, Cm7♭5) or in signs (C△7, C−7, Cø7). */
export type ChordStyle = 'words' | 'signs';

const ALTERATION = /(?:b5|#5|b9|#9|#11|b13)/g;

const TO_SIGNS: readonly [RegExp, string][] = [
  [/^m(7|9|11)b5/, 'ø$1'], [/^dim/, '°'], [/^aug/, '+'], [/^m\(maj(\d+)\)/, '−△$1'], [/^maj(?=\d)/, '△'], [/^m(?!aj)/, '−'],
];

/** "G7(♭9 ♭13)", "B♭maj9", "F♯m11", "C/E". Two alterations and more stand in brackets, so that the eye can part them. */
export function chordName({ root, bass, suffix }: Pick<Chord, 'root' | 'bass' | 'suffix'>, style: ChordStyle = 'words'): string {
  return printedNote(root) + printedSuffix(suffix, style) + (bass ? `/${printedNote(bass)}` : '');
}

function printedSuffix(suffix: string, style: ChordStyle = 'words'): string {
  const signed = style === 'signs' ? TO_SIGNS.reduce((text, [from, to]) => text.replace(from, to), suffix) : suffix;
  const alterations = signed.match(ALTERATION) ?? [];
  const isBracketed = alterations.length > 1 && !signed.includes('(');
  const text = isBracketed ? signed.replace(new RegExp(`(?:${ALTERATION.source})+`), `(${alterations.join(' ')})`) : signed;
  return text.replaceAll('#', '♯').replace(/b(?=\d)/g, '♭');
}
