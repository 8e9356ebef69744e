import { describe, expect, it } from 'vitest';
import { barLengthMs, judgeSequence, type AskedStep, type KeyDown, type SequenceLimits } from '@/lib/harmony/judge-sequence';
import { changeWords, seventhResolution } from '@/lib/harmony/leading-words';
import { targetOf } from '@/lib/harmony/target';

/** The worked example S32 of the school's own job scenarios: rootless two-five-one in C, a chord a bar at 80 beats a minute. */
const register = { lowest: 50, highest: 69 };
const D = targetOf({ symbol: 'Dm9', stack: 'b3-5-b7-9', register });
const G = targetOf({ symbol: 'G13', stack: 'b7-9-3-13', register });
const G_WITH_FIFTH = targetOf({ symbol: 'G9', stack: 'b7-9-3-5', register });
const C = targetOf({ symbol: 'Cmaj9', stack: '3-5-7-9', register });
const ASKED: AskedStep[] = [{ accepts: [D] }, { accepts: [G], alsoAccepts: [G_WITH_FIFTH] }, { accepts: [C] }];
const LIMITS: SequenceLimits = { beatsPerMinute: 80, beatsPerChord: 4, onsetMs: 150, spreadMs: 60, movePerChange: 6 };

const chord = (keys: number[], startMs: number, spreadMs = 0): KeyDown[] => keys.map((key, at) => ({ key, atMs: startMs + (spreadMs * at) / Math.max(1, keys.length - 1) }));
const play = (g: number[], c: number[], starts = [40, 3120, 5930]) => [...chord([53, 57, 60, 64], starts[0] ?? 0, 22), ...chord(g, starts[1] ?? 0, 35), ...chord(c, starts[2] ?? 0, 48)];
const RIGHT_G = [53, 57, 59, 64];
const RIGHT_C = [52, 55, 59, 62];
const hear = (downs: KeyDown[], over: Partial<SequenceLimits> = {}) => judgeSequence(ASKED, downs, { ...LIMITS, ...over });

it('passes what is in time and moves little: bar 3.000 s, +40, +120, −70 ms, movement 1 and 5', () => {
  const heard = hear(play(RIGHT_G, RIGHT_C));
  expect(barLengthMs(LIMITS)).toBe(3000);
  expect(heard).toMatchObject({ outcome: 'right', problems: [], notes: [] });
  expect(heard.steps.map(({ onsetOffsetMs }) => onsetOffsetMs)).toEqual([40, 120, -70]);
  expect(heard.steps.map(({ spreadMs }) => spreadMs)).toEqual([22, 35, 48]);
  expect(heard.changes.map(({ distance }) => distance)).toEqual([1, 5]);
});

it('Cmaj7 with its root is not yet, and says which notes are missing', () => {
  const heard = hear(play(RIGHT_G, [52, 55, 60, 64]));
  expect(heard.outcome).toBe('not_yet');
  expect(heard.problems.join(' ')).toContain('The root C is played; this voicing leaves it out.');
  expect(heard.problems.join(' ')).toContain('The major 7th (B) and the 9th (D) are missing.');
});

it('5 in place of 13 is allowed here: a pass with a note, movement 3 and 3', () => {
  const heard = hear(play([53, 57, 59, 62], RIGHT_C));
  expect(heard).toMatchObject({ outcome: 'right_with_note', problems: [] });
  expect(heard.notes).toEqual(['G9 (no root) was played another way; that counts too.']);
  expect(heard.changes.map(({ distance }) => distance)).toEqual([3, 3]);
});

describe('each fault in its own sentence', () => {
  const problems = (downs: KeyDown[], over: Partial<SequenceLimits> = {}) => hear(downs, over).problems;
  it('late and early, to the millisecond at the limit', () => {
    expect(problems(play(RIGHT_G, RIGHT_C, [0, 3150, 6000]))).toEqual([]);
    expect(problems(play(RIGHT_G, RIGHT_C, [0, 3151, 6000]))).toEqual(['G13 (no root) came 151 ms too late; up to 150 ms counts.']);
    expect(problems(play(RIGHT_G, RIGHT_C, [-200, 3000, 6000]))).toEqual(['Dm9 (no root) came 200 ms too early; up to 150 ms counts.']);
  });
  it('not together', () => {
    expect(problems([...chord([53, 57, 60, 64], 0, 61), ...chord(RIGHT_G, 3000), ...chord(RIGHT_C, 6000)])).toEqual(['The keys of Dm9 (no root) fell within 61 ms; together means within 60 ms.']);
  });
  it('voices that move too far, and a top line', () => {
    expect(problems(play(RIGHT_G, RIGHT_C), { movePerChange: 4 })).toEqual(['From G13 (no root) to Cmaj9 (no root) the voices move 5 half steps in all; at most 4 is asked.']);
    expect(problems(play(RIGHT_G, RIGHT_C), { topMoves: [0, -2] })).toEqual([]);
    expect(problems(play(RIGHT_G, RIGHT_C), { topMoves: [-1, -2] })).toEqual(['From Dm9 (no root) to G13 (no root) the top voice should fall a half step.']);
  });
  it('nothing played in a bar, nothing at all', () => {
    expect(problems([...chord([53, 57, 60, 64], 0), ...chord(RIGHT_C, 6000)])[0]).toMatch(/^G13 \(no root\): Nothing played\./);
    expect(hear([])).toMatchObject({ outcome: 'not_yet', beatsPerMinute: null });
  });
});

it('measures the tempo that was played', () => {
  expect(hear(play(RIGHT_G, RIGHT_C, [0, 3000, 6000])).beatsPerMinute).toBe(80);
  expect(hear(play(RIGHT_G, RIGHT_C, [100, 3000, 5900])).beatsPerMinute).toBe(83);
});

// MT21 "Voice Leading Seventh Chords" and OMT: the seventh falls by a step, or stays as a common tone.
describe('sevenths at the change', () => {
  const d = { target: D, keys: [53, 57, 60, 64] };
  it('the 7th of ii falls a half step to the 3rd of V', () => {
    expect(seventhResolution(d, { target: G, keys: RIGHT_G })).toEqual({ isResolved: true, words: 'The 7th of Dm9 resolves. C falls a half step to B: ♭7 becomes 3.' });
  });
  it('one that leaps is named with where it belongs', () => {
    const low = targetOf({ symbol: 'G13', stack: '3-13-b7-9', register: { lowest: 57, highest: 81 } });
    expect(seventhResolution(d, { target: low, keys: [59, 64, 65, 69] })?.isResolved).toBe(false);
    const heard = judgeSequence([{ accepts: [D] }, { accepts: [low] }], [...chord([53, 57, 60, 64], 0), ...chord([59, 64, 65, 69], 3000)], { ...LIMITS, movePerChange: undefined, sevenths: 'resolve' });
    expect(heard.problems).toEqual(['The 7th of Dm9, C, should fall a step into G13 (no root), or stay.']);
  });
  it('every voice of a change in words', () => {
    expect(changeWords(d, { target: G, keys: RIGHT_G })).toEqual(['F stays: ♭3 becomes ♭7.', 'A stays: 5 becomes 9.', 'C falls a half step to B: ♭7 becomes 3.', 'E stays: 9 becomes 13.']);
  });
});
