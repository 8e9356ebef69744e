import { describe, expect, it } from 'vitest';
import { findVoicings, scoreOfFinder, voicingQuerySchema } from './voicing-finder';

const ask = (over: Record<string, string> = {}) => voicingQuerySchema.parse(over);
const found = (over: Record<string, string> = {}) => {
  const result = findVoicings(ask(over), 'words');
  if (result.kind === 'refused') throw new Error(result.message);
  return result;
};
const refusal = (over: Record<string, string>) => {
  const result = findVoicings(ask(over), 'words');
  return result.kind === 'refused' ? result.message : null;
};

describe('the finder', () => {
  it('answers a two-five-one with nothing asked: six half steps, each move said', () => {
    const { voicings, cost } = found();
    expect(cost).toBe(6);
    expect(voicings.map(({ name, form }) => [name, form])).toEqual([['Dm9', 'Rootless A'], ['G13', 'Rootless B'], ['Cmaj9', 'Rootless A']]);
    expect(voicings[1]?.moves).toContain('C falls a half step to B: ♭7 becomes 3.');
    expect(voicings[1]?.seventh).toBe('The 7th of Dm9 resolves. C falls a half step to B: ♭7 becomes 3.');
    expect(voicings.map(({ movedSemitones }) => movedSemitones)).toEqual([0, 1, 5]);
    expect(voicings[2]?.hasParallels).toBe(true);
  });
  it('reads symbols, numerals in a key, bar lines and repeats', () => {
    expect(found({ chords: 'Dm9 | G13 ∣ Cmaj9'.replace('∣', '|') }).cost).toBe(6);
    expect(found({ chords: 'iim9, V13, Imaj9', tonic: 'Gb' }).voicings.map(({ name }) => name)).toEqual(['A♭m9', 'D♭13', 'G♭maj9']);
    expect(found({ chords: 'Cmaj9 . . Dm9' }).voicings).toHaveLength(4);
  });
  it('says in a sentence what is in the way, and loses nothing', () => {
    expect(refusal({ chords: '  ' })).toMatch(/^Type chords/);
    expect(refusal({ chords: 'Dm9 H7' })).toBe('H7: H is the German name of B. Write B, or Bb for the German B.');
    expect(refusal({ chords: '. Dm9' })).toMatch(/no chord before the repeat sign/);
    expect(refusal({ chords: 'Dm9 N.C.' })).toBe('N.C. has no notes to voice.');
    expect(refusal({ chords: 'C '.repeat(65) })).toBe('At most 64 chords at a time.');
    expect(refusal({ forms: '' })).toBe('Choose at least one form.');
    expect(refusal({ lowest: '60', highest: '66' })).toMatch(/narrower than an octave/);
    expect(refusal({ chords: 'C5 Dm7' })).toMatch(/^C5 has none of these forms/);
    expect(refusal({ forms: 'shell_open', reach: '5' })).toMatch(/reach/);
  });
  it('takes what an address may hold and falls back where it makes no sense', () => {
    expect(ask({ tonic: 'H', lowest: 'x', highest: '9999', reach: '-1', tempo: '0', forms: 'shell,<script>' })).toMatchObject({ tonic: 'C', lowest: 48, highest: 72, reach: 12, tempo: 80, forms: ['shell'] });
  });
  it('gives the same notes to the stave and to files', () => {
    const { voicings } = found();
    expect(scoreOfFinder(ask(), voicings).bars.map(({ notes }) => notes)).toEqual(voicings.map(({ notes }) => notes));
  });
});
