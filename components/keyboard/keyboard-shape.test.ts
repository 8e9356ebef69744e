import { expect, it } from 'vitest';
import { isBlackKey } from '@/lib/harmony/note';
import { countWhite, keyboardRange, keyOfComputerKey, keyShapes, WHITE_WIDTH } from './keyboard-shape';
import { readMidiMessage } from './midi-message';

it('begins on the C below and ends on the B above, two octaves at least', () => {
  expect(keyboardRange([50, 55, 60, 65, 69])).toEqual({ lowest: 48, highest: 71 });
  expect(keyboardRange([43, 53, 59, 64, 69])).toEqual({ lowest: 36, highest: 71 });
  expect(keyboardRange([60])).toEqual({ lowest: 60, highest: 83 });
  expect(keyboardRange([])).toEqual({ lowest: 48, highest: 71 });
});

it('draws every key once, white keys side by side, black keys on top', () => {
  const shapes = keyShapes(48, 71);
  expect(shapes).toHaveLength(24);
  expect(countWhite(48, 71)).toBe(14);
  expect(shapes.filter(({ isBlack }) => !isBlack).map(({ x }) => x)).toEqual(Array.from({ length: 14 }, (_none, at) => at * WHITE_WIDTH));
  expect(shapes.slice(14).every(({ key, isBlack }) => isBlack && isBlackKey(key))).toBe(true);
});

it('plays the letter rows by place', () => {
  expect(keyOfComputerKey('KeyA', 60)).toBe(60);
  expect(keyOfComputerKey('KeyW', 60)).toBe(61);
  expect(keyOfComputerKey('KeyK', 60)).toBe(72);
  expect(keyOfComputerKey('KeyQ', 60)).toBeNull();
});

it('reads note on and off, takes velocity 0 for off, leaves the pedal alone', () => {
  expect(readMidiMessage(new Uint8Array([0x93, 60, 90]))).toEqual({ kind: 'down', key: 60 });
  expect(readMidiMessage(new Uint8Array([0x90, 60, 0]))).toEqual({ kind: 'up', key: 60 });
  expect(readMidiMessage(new Uint8Array([0x80, 60, 64]))).toEqual({ kind: 'up', key: 60 });
  expect(readMidiMessage(new Uint8Array([0xb0, 64, 127]))).toBeNull();
  expect(readMidiMessage(new Uint8Array([0xf8]))).toBeNull();
});
