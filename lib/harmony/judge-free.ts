import { stepOf, type Degree } from './degree';
import { findingsOf, stepAbove, type Findings } from './findings';
import type { KeyNumber } from './note';
import type { Target } from './target';
import { essentialDegrees, roleOf, tensionUse } from './tones';
import { HEADLINES, type HeardTone, type Verdict } from './verdict';
import { detailSentences, named, presentSentence } from './verdict-words';

const ALTERED: readonly Degree[] = ['b9', '#9', '#11', 'b13'];

/** What a free voicing of this chord must have: guide tones, an altered fifth, and every colour the symbol alters or ends on. */
function requiredDegrees({ chord }: Target): Degree[] {
  const colours = chord.degrees.filter((degree) => roleOf(degree) === 'colour');
  return [...essentialDegrees(chord), ...colours.filter((degree, at) => ALTERED.includes(degree) || at === colours.length - 1)];
}

/** Any spacing, any inversion, any available tension: heard are only the degrees that must be there and those that must not. */
export function freeVerdict(target: Target, keys: readonly KeyNumber[], lowest: KeyNumber): Verdict {
  const all = findingsOf(target, keys);
  const required = requiredDegrees(target);
  const missing = all.missing.filter((degree) => required.includes(degree));
  const foreign = all.foreign.filter((tone) => !isWelcome(target, tone));
  const lacksColour = target.chord.isAlt && !keys.some((key) => ALTERED.some((degree) => stepOf(degree) === stepAbove(target, key)));
  const found: Findings = { ...all, missing, foreign, unasked: [], doubled: [], missingEssential: missing };
  const isClean = missing.length === 0 && foreign.length === 0 && all.avoid.length === 0 && !lacksColour;
  const colour = lacksColour ? [`Add one altered colour, such as ${named(target, 'b9')} or ${named(target, 'b13')}.`] : [];
  const kind = isClean ? 'clean' : faultOf(found);
  return {
    ...found, kind, isClean, isRight: isClean, octavesOff: 0, headline: HEADLINES[kind],
    details: isClean ? [presentSentence(required)] : [...detailSentences(target, found, lowest), ...colour],
  };
}

function faultOf({ avoid, foreign }: Findings): 'avoid' | 'foreign' | 'missing' {
  if (avoid.length > 0) return 'avoid';
  return foreign.length > 0 ? 'foreign' : 'missing';
}

/** An altered chord takes altered colours only; any other takes what its avoid notes leave. */
function isWelcome({ chord }: Target, { degree }: HeardTone): boolean {
  if (chord.isAlt) return ALTERED.includes(degree) || degree === 'b5' || degree === '#5';
  const use = tensionUse(chord, degree);
  return roleOf(degree) === 'colour' && (use === 'available' || use === 'caution');
}
