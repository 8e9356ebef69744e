import { describe, expect, it } from 'vitest';
import { weightedScore } from './score';

const marks = (...scores: number[]) => [50, 30, 20].map((weightPercent, at) => ({ criterion: ['Notes', 'Time', 'Tone'][at] ?? '', weightPercent, score: scores[at] ?? 0 }));

describe('job scenario S33: weights 50, 30, 20', () => {
  it('4, 3, 2 make 3.30: passed', () => {
    expect(weightedScore(marks(4, 3, 2))).toMatchObject({ totalHundredths: 330, isPassed: true });
  });
  it('4, 4, 1 make 3.40, but one is below 2: not yet', () => {
    const { totalHundredths, isPassed, steps } = weightedScore(marks(4, 4, 1));
    expect([totalHundredths, isPassed]).toEqual([340, false]);
    expect(steps).toContain('Tone has 1; every criterion needs at least 2.');
  });
});

it('passes at exactly 3.00', () => {
  expect(weightedScore(marks(3, 3, 3))).toMatchObject({ totalHundredths: 300, isPassed: true });
  expect(weightedScore(marks(3, 3, 2))).toMatchObject({ totalHundredths: 280, isPassed: false });
});

it('refuses marks and weights that are none', () => {
  expect(() => weightedScore(marks(5, 3, 2))).toThrow('0 to 4');
  expect(() => weightedScore(marks(2.5, 3, 2))).toThrow('0 to 4');
  expect(() => weightedScore([{ criterion: 'Notes', weightPercent: 90, score: 4 }])).toThrow('100');
});
