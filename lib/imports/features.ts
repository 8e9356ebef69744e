import { typedText, type Cell } from './cell';

export type ReadFeature = { code: string; label: string; quantity: number };

const NUMBER_WORDS: Record<string, number> = { a: 1, one: 1, two: 2, three: 3, four: 4, five: 5, six: 6, eight: 8, ten: 10 };

/** How rooms are furnished in people's own words, by the codes that the room board and the openings know. */
const KNOWN: readonly { words: RegExp; codes: readonly [string, string][] }[] = [
  { words: /\bgrand\b/, codes: [['grand_piano', 'grand piano'], ['acoustic_piano', 'acoustic piano']] },
  { words: /\bdigital pianos?\b|\bkeyboards?\b|\bstage pianos?\b/, codes: [['digital_piano', 'digital piano']] },
  { words: /\bupright|\bpianos?\b/, codes: [['acoustic_piano', 'acoustic piano']] },
  { words: /\bdrums?\b/, codes: [['drum_kit', 'drum kit']] },
  { words: /^pa$|\bpa system\b|\bsound system\b/, codes: [['pa', 'PA']] },
  { words: /\bstep[ -]free\b|\bwheelchair\b/, codes: [['step_free', 'step-free access']] },
];

/** "two digital pianos; PA" → digital piano × 2, PA. What is not known keeps its own name. */
export function readFeatures(cell: Cell): ReadFeature[] {
  const found = new Map<string, ReadFeature>();
  for (const part of listed(cell)) {
    const { quantity, label } = counted(part);
    const known = KNOWN.find(({ words }) => words.test(part.toLowerCase()));
    const features = known ? known.codes : [[codeOf(label), label] as const];
    for (const [code, word] of features) if (!found.has(code)) found.set(code, { code, label: word, quantity });
  }
  return [...found.values()];
}

function counted(part: string): { quantity: number; label: string } {
  const [first = '', ...rest] = part.split(' ');
  const quantity = /^\d{1,2}$/.test(first) ? Number(first) : (NUMBER_WORDS[first.toLowerCase()] ?? 0);
  return quantity > 0 && rest.length > 0 ? { quantity, label: rest.join(' ') } : { quantity: 1, label: part };
}

/** Instruments or subjects in a teacher's row, each once. */
export const readSubjects = (cell: Cell): string[] => [...new Set(listed(cell).map((word) => word.toLowerCase()))];

const listed = (cell: Cell): string[] => typedText(cell).split(/[;,/&+]|\band\b/i).map((part) => part.trim()).filter((part) => part !== '');

export const codeOf = (label: string): string => label.toLowerCase().replace(/[^\p{L}\p{N}]+/gu, '_').replace(/^_|_$/g, '').slice(0, 40) || 'other';

/** A school of keyboard harmony counts these instruments as its own subject; anything else is a subject of its own name. */
export const isKeyboard = (word: string): boolean => /^(piano|pianos|keyboard|keyboards|keys|harmony|keyboard harmony)$/.test(word);
