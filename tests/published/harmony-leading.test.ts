import { describe, expect, it } from 'vitest';
import { leadingBetween } from '@/lib/harmony/voice-leading';

/**
 * Movements of the voices. MT21: Hutchinson, Music Theory for the 21st-Century Classroom. OMT: Open Music Theory,
 * "First species" and motion types. TYM: companion site to Tymoczko, ch. 10 (the forms by name). Where no source is
 * named the figure is own arithmetic on the stated keys.
 */
type Row = { name: string; chords: number[][]; moves: number[][]; total: number; above?: number };

const ROWS: Row[] = [
  { name: 'guide tones of a two-five-one go by step (MT21)', chords: [[60, 65], [59, 65], [59, 64]], moves: [[1, 0], [0, 1]], total: 2 },
  { name: 'shells', chords: [[50, 53, 60], [43, 53, 59], [48, 52, 59]], moves: [[7, 0, 1], [5, 1, 0]], total: 14, above: 2 },
  { name: 'rootless A-B-A (TYM)', chords: [[53, 57, 60, 64], [53, 57, 59, 64], [52, 55, 59, 62]], moves: [[0, 0, 1, 0], [1, 2, 0, 2]], total: 6 },
  { name: 'rootless B-A-B (TYM)', chords: [[60, 64, 65, 69], [59, 64, 65, 69], [59, 62, 64, 67]], moves: [[1, 0, 0, 0], [0, 2, 1, 2]], total: 6 },
  { name: 'five-note stacks', chords: [[50, 55, 60, 65, 69], [43, 53, 59, 64, 69], [48, 52, 59, 62, 67]], moves: [[7, 2, 1, 1, 0], [5, 1, 0, 2, 2]], total: 21, above: 9 },
  { name: 'stacks with the altered dominant', chords: [[50, 55, 60, 65, 69], [43, 53, 59, 63, 68], [48, 52, 59, 62, 67]], moves: [[7, 2, 1, 2, 1], [5, 1, 0, 1, 1]], total: 21, above: 9 },
  { name: 'tritone substitute', chords: [[53, 57, 60, 64], [53, 58, 59, 63], [52, 55, 59, 62]], moves: [[0, 1, 1, 1], [1, 3, 0, 1]], total: 8 },
  { name: 'minor two-five-one', chords: [[53, 56, 60, 62], [53, 56, 59, 63], [51, 55, 57, 62]], moves: [[0, 0, 1, 1], [2, 1, 2, 1]], total: 8 },
  { name: 'drop 2', chords: [[57, 62, 65, 72], [55, 62, 65, 71], [55, 60, 64, 71]], moves: [[2, 0, 0, 1], [0, 2, 1, 0]], total: 6 },
];

const changesOf = (chords: readonly number[][]) => chords.slice(1).map((chord, at) => leadingBetween(chords[at] ?? [], chord));

it.each(ROWS)('$name', ({ chords, moves, total, above }) => {
  const changes = changesOf(chords);
  expect(changes.map((change) => change.moves.map(({ semitones }) => Math.abs(semitones)))).toEqual(moves);
  expect(changes.reduce((sum, { distance }) => sum + distance, 0)).toBe(total);
  if (above !== undefined) expect(changes.reduce((sum, { distanceAboveBass }) => sum + distanceAboveBass, 0)).toBe(above);
});

it('the top of the altered cadence and of the substitute falls by half steps', () => {
  for (const row of [ROWS[5], ROWS[6]]) expect(changesOf(row?.chords ?? []).map(({ topMoves }) => topMoves)).toEqual([-1, -1]);
});

describe('parallels', () => {
  const kinds = (from: number[], to: number[]) => leadingBetween(from, to).parallels.map(({ kind, lower, upper }) => `${kind} ${lower.from}-${upper.from}`);
  it('two fifths in similar motion (OMT)', () => {
    expect(kinds([48, 55, 64, 71], [50, 57, 65, 72])).toEqual(['fifths 48-55', 'fifths 64-71']);
  });
  it('a fifth to a twelfth is the same as a fifth to a fifth (OMT), and octaves', () => {
    expect(kinds([48, 55], [45, 64])).toEqual(['fifths 48-55']);
    expect(kinds([48, 60], [50, 62])).toEqual(['octaves 48-60']);
  });
  it('one voice still is oblique motion (OMT), a flat fifth to a plain one is none (MT21, unequal fifths)', () => {
    expect(kinds([48, 55], [48, 60])).toEqual([]);
    expect(kinds([59, 65], [60, 67])).toEqual([]);
  });
  it('rootless A-B-A has one, B-A-B has none: information, not a fault', () => {
    expect(kinds([53, 57, 59, 64], [52, 55, 59, 62])).toEqual(['fifths 57-64']);
    expect(changesOf(ROWS[3]?.chords ?? []).flatMap(({ parallels }) => parallels)).toEqual([]);
  });
});

it('with unequal numbers of voices the smaller chord takes the nearest voices, uncrossed', () => {
  expect(leadingBetween([60, 64, 67], [48, 59, 64, 67]).moves).toEqual([{ from: 60, to: 59, semitones: -1 }, { from: 64, to: 64, semitones: 0 }, { from: 67, to: 67, semitones: 0 }]);
  expect(leadingBetween([48, 59, 64, 67], [60, 64, 67]).distance).toBe(1);
  expect(leadingBetween([], [60]).distance).toBe(0);
});
