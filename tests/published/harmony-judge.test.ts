import { describe, expect, it } from 'vitest';
import { judge } from '@/lib/harmony/judge';
import { readingsOf } from '@/lib/harmony/readings';
import { targetName, targetOf } from '@/lib/harmony/target';

// Expected verdicts: own arithmetic by the published rules on guide tones, omitted fifths, sus and avoid notes that
// harmony-voicings.test.ts cites (MT21; article "Avoid note"). T1 Cmaj9, T2 G13, T3 Dm11 as the curriculum stacks them.
const low = { lowest: 47, highest: 58 };
const T1 = targetOf({ symbol: 'Cmaj9', stack: '1-3-7-9-5', rootRegister: low });
const T2 = targetOf({ symbol: 'G13', stack: '1-b7-3-13-9', rootRegister: { lowest: 41, highest: 52 } });
const T3 = targetOf({ symbol: 'Dm11', stack: '1-11-b7-b3-5', rootRegister: low });
const tones = (list: { note: string; degree: string }[]) => list.map(({ note, degree }) => `${note}=${degree}`);

it('the targets lie where the table puts them', () => {
  expect([T1, T2, T3].map(({ notes }) => notes.map(({ key }) => key))).toEqual([[48, 52, 59, 62, 67], [43, 53, 59, 64, 69], [50, 55, 60, 65, 69]]);
});

it('J1 exact', () => {
  expect(judge(T1, [48, 52, 59, 62, 67])).toMatchObject({ kind: 'exact', isRight: true, isClean: true, headline: 'Right notes, right order.' });
});

it('J2 the plain fifth is missing, the essentials are complete', () => {
  expect(judge(T1, [48, 52, 59, 62])).toMatchObject({ kind: 'missing', missing: ['5'], missingEssential: [], isClean: true, isRight: false });
});

it('J3 the natural 11 in place of the third of a major chord is an avoid note', () => {
  const verdict = judge(T1, [48, 53, 59, 62, 67]);
  expect(verdict).toMatchObject({ kind: 'avoid', missingEssential: ['3'], isClean: false, isRight: false });
  expect(tones(verdict.avoid)).toEqual(['F=11']);
  expect(verdict.details).toContain('Move F a half step down to E, the 3rd.');
});

it('J4 a flat seventh makes it C9', () => {
  const verdict = judge(T1, [48, 52, 58, 62, 67]);
  expect(verdict).toMatchObject({ kind: 'foreign', missing: ['7'], soundsAs: 'C9' });
  expect(tones(verdict.foreign)).toEqual(['Bb=b7']);
});

it('J5 right shape, one octave high', () => {
  const verdict = judge(T1, [60, 64, 71, 74, 79]);
  expect(verdict).toMatchObject({ kind: 'register', octavesOff: 1, isRight: false });
  expect(verdict.details).toEqual(['One octave too high: begin on C3.']);
});

it('J6 the third in the bass is an inversion', () => {
  const verdict = judge(T1, [52, 59, 60, 62, 67]);
  expect(verdict).toMatchObject({ kind: 'inversion', missing: [], foreign: [] });
  expect(verdict.details).toEqual(['E, the 3rd, is in the bass; C3 belongs there.']);
});

it('J7 the fifth doubled below', () => {
  expect(judge(T1, [48, 52, 55, 59, 62, 67])).toMatchObject({ kind: 'doubled', missing: [], doubled: [{ key: 55, degree: '5', note: 'G' }] });
});

it('J8 the root doubled in the bass', () => {
  expect(judge(T1, [36, 48, 52, 59, 62, 67])).toMatchObject({ kind: 'doubled', doubled: [{ key: 36, degree: '1', note: 'C' }] });
});

it('J9 the ninth is missing, the third doubled', () => {
  expect(judge(T1, [48, 52, 59, 64, 67])).toMatchObject({ kind: 'missing', missing: ['9'], doubled: [{ key: 64, degree: '3' }] });
});

it('J10 a natural 11 over a dominant that has its third', () => {
  const verdict = judge(T2, [43, 53, 59, 60, 69]);
  expect(verdict).toMatchObject({ kind: 'avoid', missing: ['13'] });
  expect(tones(verdict.avoid)).toEqual(['C=11']);
});

it('J11 a fourth in place of the third of a dominant is named as the sus chord it is', () => {
  const verdict = judge(T2, [43, 53, 60, 64, 69]);
  expect(verdict).toMatchObject({ kind: 'sus', missing: ['3'], soundsAs: 'G13sus4' });
  expect(verdict.details.join(' ')).toContain('G13sus4');
  expect(verdict.details.join(' ')).not.toContain('clash');
});

it('J12 the 11 over a minor chord is no avoid note', () => {
  expect(judge(T3, [50, 55, 60, 65, 69])).toMatchObject({ kind: 'exact', avoid: [] });
});

it('J13 spelling cannot be heard; names come from the target', () => {
  const flat = targetOf({ symbol: 'Gbmaj9', stack: '1-3-7-9-5', rootRegister: low });
  const sharp = targetOf({ symbol: 'F#maj9', stack: '1-3-7-9-5', rootRegister: low });
  expect(judge(flat, sharp.notes.map(({ key }) => key))).toMatchObject({ kind: 'exact' });
  expect(judge(flat, [54, 58, 65, 68]).details[0]).toContain('D♭');
  expect(judge(sharp, [54, 58, 65, 68]).details[0]).toContain('C♯');
});

it('J14 rootless: Fmaj7 and Dm9 are the same keys, and only the target tells', () => {
  const target = targetOf({ symbol: 'Dm9', stack: 'b3-5-b7-9', register: { lowest: 50, highest: 69 } });
  expect(judge(target, [53, 57, 60, 64])).toMatchObject({ kind: 'exact' });
  expect(targetName(target)).toBe('Dm9 (no root)');
  expect(readingsOf([53, 57, 60, 64]).map(({ name }) => name)).toEqual(expect.arrayContaining(['Fmaj7', 'Dm9 (no root)']));
});

it('J15 rootless thirteenth, B form', () => {
  const target = targetOf({ symbol: 'G13', stack: 'b7-9-3-13', register: { lowest: 50, highest: 69 } });
  expect(judge(target, [53, 57, 59, 64])).toMatchObject({ kind: 'exact', missing: [] });
  expect(target.notes.map(({ degree }) => degree)).toEqual(['b7', '9', '3', '13']);
});

describe('J16', () => {
  it('nothing, one note, no key, the same key twice', () => {
    expect(judge(T1, [])).toMatchObject({ kind: 'nothing_played', isClean: false, headline: 'Nothing played.' });
    expect(judge(T1, [60])).toMatchObject({ kind: 'missing', missingEssential: ['3', '7'], isClean: false });
    expect(judge(T1, [48, 128])).toMatchObject({ kind: 'not_a_key', isRight: false });
    expect(judge(T1, [48.5])).toMatchObject({ kind: 'not_a_key' });
    expect(judge(T1, [67, 48, 48, 52, 59, 62, 62])).toMatchObject({ kind: 'exact' });
  });
});

describe('rootless voicings name a root that was played (job scenario S32)', () => {
  it('the root is in the left hand; the 7th and the 9th are missing', () => {
    const target = targetOf({ symbol: 'Cmaj9', stack: '3-5-7-9', register: { lowest: 50, highest: 69 } });
    const verdict = judge(target, [52, 55, 60, 64]);
    expect(verdict).toMatchObject({ isRight: false, missing: ['7', '9'] });
    expect(verdict.details.join(' ')).toContain('The root C is played; this voicing leaves it out.');
    expect(verdict.details.join(' ')).toContain('The major 7th (B) and the 9th (D) are missing.');
  });
});

describe('free voicings: any spacing without a fault', () => {
  it.each([
    ['Cmaj7', [48, 52, 59, 62], 'clean'], ['Cmaj7', [52, 59, 60, 67], 'clean'], ['Cmaj7', [48, 52, 59, 65], 'avoid'], ['G7', [43, 53, 59, 60], 'avoid'],
    ['Dm7', [50, 53, 60, 67], 'clean'], ['G7alt', [43, 53, 59, 63], 'clean'], ['G7alt', [43, 53, 59], 'missing'], ['G7alt', [43, 53, 59, 62], 'foreign'],
    ['G13b9', [43, 53, 59, 64, 68], 'clean'], ['G13b9', [43, 53, 59, 64], 'missing'], ['Cmaj7', [48, 58, 52], 'foreign'],
  ])('%s played %j is %s', (symbol, keys, kind) => {
    expect(judge(targetOf({ symbol }), keys)).toMatchObject({ kind, isRight: kind === 'clean' });
  });
});
