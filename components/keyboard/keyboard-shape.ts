import { isBlackKey, type KeyNumber } from '@/lib/harmony/note';

/** Measures of the drawing, in its own units. */
export const WHITE_WIDTH = 34;
export const WHITE_HEIGHT = 128;
export const BLACK_WIDTH = 20;
export const BLACK_HEIGHT = 80;
/** Room under the keys for C3, C4, C5. */
export const FOOT_HEIGHT = 20;

export type DrawnKeyShape = { key: KeyNumber; isBlack: boolean; x: number };

const C = 12;
const B_ABOVE_C = 11;

/** From the C at or below to the B at or above, at least two octaves: a keyboard is read by its Cs. */
export function keyboardRange(keys: readonly KeyNumber[], fewestOctaves = 2): { lowest: KeyNumber; highest: KeyNumber } {
  const [low, high] = keys.length > 0 ? [Math.min(...keys), Math.max(...keys)] : [48, 71];
  const lowest = Math.floor(low / C) * C;
  const highest = Math.max(Math.floor(high / C) * C + B_ABOVE_C, lowest + fewestOctaves * C - 1);
  return { lowest, highest };
}

/** Where each key stands. Black keys come last, so that they are drawn over the white ones. */
export function keyShapes(lowest: KeyNumber, highest: KeyNumber): DrawnKeyShape[] {
  const shapes: DrawnKeyShape[] = [];
  let whites = 0;
  for (let key = lowest; key <= highest; key += 1) {
    const isBlack = isBlackKey(key);
    shapes.push({ key, isBlack, x: isBlack ? whites * WHITE_WIDTH - BLACK_WIDTH / 2 : whites * WHITE_WIDTH });
    if (!isBlack) whites += 1;
  }
  return shapes.sort((a, b) => Number(a.isBlack) - Number(b.isBlack));
}

export const countWhite = (lowest: KeyNumber, highest: KeyNumber): number =>
  Array.from({ length: highest - lowest + 1 }, (_none, at) => lowest + at).filter((key) => !isBlackKey(key)).length;

/** Two rows of a computer keyboard as one octave and a bit, from the C under the middle of the drawing. */
const COMPUTER_KEYS = ['KeyA', 'KeyW', 'KeyS', 'KeyE', 'KeyD', 'KeyF', 'KeyT', 'KeyG', 'KeyY', 'KeyH', 'KeyU', 'KeyJ', 'KeyK', 'KeyO', 'KeyL', 'KeyP', 'Semicolon'];

/** The key that a computer key plays; null for one that plays none. By its place, so that every keyboard layout works. */
export function keyOfComputerKey(code: string, base: KeyNumber): KeyNumber | null {
  const at = COMPUTER_KEYS.indexOf(code);
  return at === -1 ? null : base + at;
}
