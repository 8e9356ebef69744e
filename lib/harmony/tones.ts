import type { Chord } from './chord';
import { stepOf, type Degree } from './degree';

/**
 * What a degree does in a chord. Guide tones are the third and the seventh; a fourth stands for the third, a
 * sixth for the seventh. A plain fifth may be left out, an altered one may not: it defines the chord. Colours are
 * the tensions the symbol names (Music Theory for the 21st-Century Classroom, "Guide Tones", "Voicings").
 */
export type ToneRole = 'root' | 'guide' | 'fifth' | 'altered_fifth' | 'colour';

const GUIDES: readonly Degree[] = ['b3', '3', '4', '2', 'b7', '7', 'bb7', '6'];

export function roleOf(degree: Degree): ToneRole {
  if (degree === '1') return 'root';
  if (GUIDES.includes(degree)) return 'guide';
  if (degree === '5') return 'fifth';
  return degree === 'b5' || degree === '#5' ? 'altered_fifth' : 'colour';
}

/** The degrees without which the ear hears another chord: guide tones and an altered fifth. */
export const essentialDegrees = (chord: Pick<Chord, 'degrees'>): Degree[] =>
  chord.degrees.filter((degree) => ['guide', 'altered_fifth'].includes(roleOf(degree)));

export type TensionUse = 'member' | 'available' | 'caution' | 'avoid';

/** The natural and the altered form of one tension do not sound together. */
const RIVALS: Partial<Record<Degree, Degree[]>> = { '9': ['b9', '#9'], b9: ['9'], '#9': ['9'], '11': ['#11'], '#11': ['11'], '13': ['b13'], b13: ['13'] };

const hasRival = ({ degrees }: Pick<Chord, 'degrees'>, tension: Degree): boolean => RIVALS[tension]?.some((rival) => degrees.includes(rival)) ?? false;

const isDominant = ({ degrees }: Pick<Chord, 'degrees'>): boolean => degrees.includes('3') && degrees.includes('b7');

/**
 * Whether a tension may be added. One a half step above a chord tone clashes and is avoided; on a dominant only
 * the natural 11 is, for altered tensions are its business. The 13 over a minor seventh makes a tritone with the
 * third: with care, not wrong (encyclopedia article "Avoid note"; the dominant exception, and that a tension never
 * meets its own altered form, are common practice).
 */
export function tensionUse(chord: Pick<Chord, 'degrees'>, tension: Degree): TensionUse {
  if (chord.degrees.includes(tension)) return 'member';
  if (hasRival(chord, tension)) return 'avoid';
  const steps = chord.degrees.filter((degree) => roleOf(degree) !== 'colour').map(stepOf);
  const step = stepOf(tension);
  if (isDominant(chord)) return tension === '11' || tension === '7' ? 'avoid' : 'available';
  if (steps.some((tone) => (tone + 1) % 12 === step)) return 'avoid';
  const isMinorSeventh = chord.degrees.includes('b3') && chord.degrees.includes('b7');
  return isMinorSeventh && tension === '13' ? 'caution' : 'available';
}

/**
 * The degree a key is heard as, given what sounds with it: with a seventh a 6 is a 13, with a third a 4 is an 11,
 * with a natural 5 a flat 5 is a sharp 11 and a sharp 5 a flat 13, above a major third a minor third is a sharp 9
 * (Music Theory for the 21st-Century Classroom, "6 or 13", "11 versus sus", "b5 versus #11").
 */
export function heardDegree(step: number, steps: ReadonlySet<number>): Degree {
  return DEPENDS[step]?.(steps) ?? PLAIN[step] ?? '1';
}

type Steps = ReadonlySet<number>;
const PLAIN: Partial<Record<number, Degree>> = { 0: '1', 1: 'b9', 2: '9', 4: '3', 7: '5', 10: 'b7', 11: '7' };
const DEPENDS: Partial<Record<number, (steps: Steps) => Degree>> = {
  3: (steps) => (steps.has(4) ? '#9' : 'b3'),
  5: (steps) => (steps.has(3) || steps.has(4) ? '11' : '4'),
  6: (steps) => (steps.has(7) ? '#11' : 'b5'),
  8: (steps) => (steps.has(7) ? 'b13' : '#5'),
  9: sixthStep,
};

function sixthStep(steps: Steps): Degree {
  if (steps.has(10) || steps.has(11)) return '13';
  return steps.has(3) && steps.has(6) && !steps.has(7) ? 'bb7' : '6';
}

export const heardDegrees = (steps: ReadonlySet<number>): Degree[] => [...steps].map((step) => heardDegree(step, steps));
