import { isDegree, type Degree } from './degree';
import type { QualityParts } from './quality';

type Top = QualityParts['top'];
/** What is left to read, and what has been understood so far. */
type Reading = { rest: string; parts: QualityParts };

const MAJOR: QualityParts = { third: '3', fifth: '5', seventh: null, top: 0, altered: [], added: [], left: [], isAlt: false };
const MINOR: QualityParts = { ...MAJOR, third: 'b3' };
const DIMINISHED: QualityParts = { ...MINOR, fifth: 'b5' };
const AUGMENTED: QualityParts = { ...MAJOR, fifth: '#5' };

const topOf = (number: string): Top => (number === '9' ? 9 : number === '11' ? 11 : number === '13' ? 13 : 0);

/** 6, 6/9, 7, 9, 11 or 13 behind a triad; the seventh is the one the triad's word calls for. */
function numbered(parts: QualityParts, number: string | undefined, seventh: 'b7' | '7'): QualityParts {
  if (!number) return parts;
  if (number === '6') return { ...parts, seventh: '6' };
  if (number === '6/9' || number === '69') return { ...parts, seventh: '6', added: ['9'] };
  return { ...parts, seventh, top: topOf(number) };
}

const NUMBER = '(6/9|69|6|7|9|11|13)?';
const MAJ = '(?:maj|Maj|MAJ|ma(?!dd)|Ma|M|△)';

/** The first word after the root, longest meaning first. */
const HEADS: { pattern: RegExp; read: (found: RegExpExecArray) => QualityParts }[] = [
  { pattern: /^(?:min|Min|MIN|mi|Mi|m(?!aj|a(?!dd))|-) *(?:maj|Maj|ma|M|△)(7|9|11|13)?/, read: ([, n]) => numbered(MINOR, n ?? '7', '7') },
  { pattern: new RegExp(`^△${NUMBER}`), read: ([, n]) => numbered(MAJOR, n ?? '7', '7') },
  { pattern: new RegExp(`^${MAJ}${NUMBER}`), read: ([, n]) => numbered(MAJOR, n, '7') },
  { pattern: new RegExp(`^(?:min|Min|MIN|mi|Mi|m|-)${NUMBER}`), read: ([, n]) => numbered(MINOR, n, 'b7') },
  { pattern: /^(?:dim|o(?!mit)|°)7/, read: () => ({ ...DIMINISHED, seventh: 'bb7' }) },
  { pattern: /^(?:dim|o(?!mit)|°)/, read: () => DIMINISHED },
  { pattern: /^ø(7|9|11)?/, read: ([, n]) => numbered(DIMINISHED, n ?? '7', 'b7') },
  { pattern: /^(?:aug|\+) *(?:maj|Maj|ma|M|△)7/, read: () => numbered(AUGMENTED, '7', '7') },
  { pattern: /^(?:aug(7|9)?|\+(7)?)/, read: ([, word, sign]) => numbered(AUGMENTED, word ?? sign, 'b7') },
  { pattern: /^5(?!\d)/, read: () => ({ ...MAJOR, third: null }) },
  { pattern: /^2(?!\d)/, read: () => ({ ...MAJOR, added: ['9'] }) },
  { pattern: /^alt/, read: () => ({ ...MAJOR, seventh: 'b7', isAlt: true }) },
  { pattern: /^(6\/9|69|6|7|9|11|13)/, read: ([, n]) => numbered(MAJOR, n, 'b7') },
];

/** Minus is a flat and plus a sharp before 5, 9, 11 and 13 (Music Theory for the 21st-Century Classroom, chord symbols). */
const degreeFrom = (sign: string, number: string): string => (sign === '-' ? 'b' : sign === '+' ? '#' : sign) + number;

const ALTERATIONS: readonly string[] = ['b5', '#5', 'b9', '#9', '#11', 'b13'];
const ADDABLE: Record<string, Degree> = { '2': '9', '4': '11', '6': '6' };

const withAdded = (parts: QualityParts, degree: Degree): QualityParts =>
  degree === '13' && parts.top === 9 ? { ...parts, top: 13 } : { ...parts, added: [...parts.added, degree] };

/** Whatever may follow, in any order: sus, add, no, alterations, "alt". Null: this word does not fit here. */
const TAILS: { pattern: RegExp; read: (parts: QualityParts, found: RegExpExecArray) => QualityParts | null }[] = [
  { pattern: /^[ ,]*sus(2|4)?/, read: (parts, [, n]) => (parts.third === '3' ? { ...parts, third: n === '2' ? '2' : '4' } : null) },
  { pattern: /^[ ,]*add([b#+-]?)(2|4|6|9|11|13)/, read: (parts, [, sign = '', number = '']) => {
    const degree = ADDABLE[sign + number] ?? degreeFrom(sign, number);
    return isDegree(degree) ? withAdded(parts, degree) : null;
  } },
  { pattern: /^[ ,]*(?:no|omit) ?(3|5)/, read: (parts, [, n]) => {
    const gone = n === '5' ? parts.fifth : parts.third;
    return gone ? { ...parts, left: [...parts.left, gone] } : null;
  } },
  { pattern: /^[ ,]*alt/, read: (parts) => (parts.seventh === 'b7' && parts.third === '3' && parts.top === 0 ? { ...parts, isAlt: true } : null) },
  { pattern: /^[ ,]*([b#+-])(5|9|11|13)/, read: (parts, [, sign = '', number = '']) => {
    const degree = degreeFrom(sign, number);
    const isFit = ALTERATIONS.includes(degree) && isDegree(degree) && !parts.altered.includes(degree) && !parts.isAlt;
    return isFit ? { ...parts, altered: [...parts.altered, degree] } : null;
  } },
  { pattern: /^\+(?!\d)/, read: (parts) => (parts.seventh && parts.fifth === '5' ? { ...parts, fifth: '#5' } : null) },
  { pattern: /^[ ,]+(?:maj|Maj|ma|M|△)7/, read: (parts) => (parts.seventh === null ? { ...parts, seventh: '7' } : null) },
  { pattern: /^[ ,]+(9|11|13)(?!\d)/, read: (parts, [, n = '']) => (isDegree(n) && parts.seventh !== null ? withAdded(parts, n) : null) },
];

function readHead(text: string): Reading {
  for (const { pattern, read } of HEADS) {
    const found = pattern.exec(text);
    if (found) return { rest: text.slice(found[0].length), parts: read(found) };
  }
  return { rest: text, parts: MAJOR };
}

function readTail({ rest, parts }: Reading): Reading | null {
  for (const { pattern, read } of TAILS) {
    const found = pattern.exec(rest);
    const next = found && read(parts, found);
    if (next) return { rest: rest.slice(found[0].length), parts: next };
  }
  return null;
}

/** Reads everything after the root (signs already plain, brackets already opened). `rest` is what was not understood. */
export function readQuality(text: string): Reading {
  let reading = readHead(text);
  while (reading.rest.trim() !== '') {
    const next = readTail(reading);
    if (!next) break;
    reading = next;
  }
  return { ...reading, rest: reading.rest.trim() };
}
