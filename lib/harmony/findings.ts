import { chordName } from './chord-name';
import { noteOfDegree, stepOf, type Degree } from './degree';
import { pitchClassOf, type KeyNumber } from './note';
import { chordOver } from './readings';
import { askedDegrees, type Target } from './target';
import { essentialDegrees, heardDegree, tensionUse } from './tones';
import type { HeardTone, Verdict } from './verdict';

export type Findings = Pick<Verdict, 'missing' | 'missingEssential' | 'foreign' | 'avoid' | 'doubled' | 'soundsAs'> & {
  /** Members of the chord that the voicing leaves out, such as the root of a rootless form. */
  unasked: HeardTone[];
};

const TENSIONS: readonly Degree[] = ['b9', '9', '#9', '11', '#11', 'b13', '13'];

/** Semitones above the asked root, within an octave. */
export const stepAbove = (target: Target, key: KeyNumber): number => (key - pitchClassOf(target.chord.root) + 1200) % 12;

/** The asked degree that a key sounds, if any. */
const askedAt = (target: Target, key: KeyNumber): Degree | undefined =>
  askedDegrees(target).find((degree) => stepOf(degree) === stepAbove(target, key));

/**
 * Names each key by the asked chord, never by a chord guessed from the keys: a rootless Dm9 has the keys of
 * Fmaj7, and only the question tells them apart. A foreign key is named as a degree above the asked root.
 */
export function toneOf(target: Target, key: KeyNumber): HeardTone {
  const { chord } = target;
  const step = stepAbove(target, key);
  const member = chord.degrees.find((degree) => stepOf(degree) === step);
  const degree = askedAt(target, key) ?? member ?? heardDegree(step, new Set([...chord.degrees.map(stepOf), step]));
  return { key, degree, note: noteOfDegree(chord.root, degree) };
}

/** @param played different keys, from the bottom up */
export function findingsOf(target: Target, played: readonly KeyNumber[]): Findings {
  const { chord } = target;
  const tones = played.map((key) => toneOf(target, key));
  const asked = askedDegrees(target);
  const outside = tones.filter(({ key }) => askedAt(target, key) === undefined);
  const isMember = ({ degree }: HeardTone) => chord.degrees.includes(degree);
  const isAvoid = ({ degree }: HeardTone) => TENSIONS.includes(degree) && tensionUse(chord, degree) === 'avoid';
  const missing = asked.filter((degree) => !tones.some((tone) => tone.degree === degree));
  const heard = chordOver(chord.root, played);
  return {
    missing,
    missingEssential: missing.filter((degree) => essentialDegrees(chord).includes(degree)),
    unasked: outside.filter(isMember),
    avoid: outside.filter((tone) => !isMember(tone) && isAvoid(tone)),
    foreign: outside.filter((tone) => !isMember(tone) && !isAvoid(tone)),
    doubled: doubledTones(target, tones),
    soundsAs: heard && heard.suffix !== chord.suffix ? chordName(heard) : null,
  };
}

/** Of keys that sound one degree, the ones the voicing does not have: in Cmaj9 with two Gs, the lower G. */
function doubledTones({ notes }: Target, tones: readonly HeardTone[]): HeardTone[] {
  const asked = new Set(notes.map(({ key }) => key));
  return tones.filter((tone) => {
    const same = tones.filter(({ degree }) => degree === tone.degree);
    const wanted = Math.max(1, notes.filter(({ degree }) => degree === tone.degree).length);
    if (same.length <= wanted) return false;
    const kept = same.some(({ key }) => asked.has(key)) ? same.filter(({ key }) => asked.has(key)) : same.slice(0, wanted);
    return !kept.includes(tone);
  });
}
