import type { LevelSeed } from '../play-spec';
import { LEVEL_1, LEVEL_2, LEVEL_3 } from './levels-1-to-3';
import { LEVEL_4, LEVEL_5, LEVEL_6 } from './levels-4-to-6';
import { LEVEL_7, LEVEL_8 } from './levels-7-to-8';
import { LEVEL_10, LEVEL_9 } from './levels-9-to-10';

/**
 * The ladder a school starts with: ten levels of chord voicings, every rung a statement that can be computed.
 * Tempi, times and thresholds are the product's own proposals; a school sets its own in its next edition.
 */
export const FIRST_EDITION: { ladderName: string; label: string; levels: LevelSeed[] } = {
  ladderName: 'Keyboard harmony', label: 'First edition',
  levels: [LEVEL_1, LEVEL_2, LEVEL_3, LEVEL_4, LEVEL_5, LEVEL_6, LEVEL_7, LEVEL_8, LEVEL_9, LEVEL_10],
};
