import { findingsOf, stepAbove, toneOf, type Findings } from './findings';
import { freeVerdict } from './judge-free';
import { isKeyNumber, printedNote, type KeyNumber } from './note';
import { targetName, type Target } from './target';
import { emptyVerdict, HEADLINES, type Verdict, type VerdictKind } from './verdict';
import { andList, detailSentences, presentSentence, said, susSentences } from './verdict-words';

/**
 * Hears played keys against what was asked. A key held twice counts once; how a note is spelled cannot be heard,
 * so the keys of F#maj9 are an exact Gbmaj9. A target with notes wants exactly these keys; one without wants any
 * voicing of its chord that is free of faults.
 */
export function judge(target: Target, played: readonly number[]): Verdict {
  const strange = played.find((key) => !isKeyNumber(key));
  if (strange !== undefined) return emptyVerdict('not_a_key', 'Not a key of the keyboard.', ['The keyboard sent a number outside 0 to 127. Play again.']);
  const keys = [...new Set(played)].sort((a, b) => a - b);
  const lowest = keys[0];
  if (lowest === undefined) return emptyVerdict('nothing_played', 'Nothing played.', [`Hold all the keys of ${targetName(target)} together.`]);
  return target.notes.length > 0 ? exactVerdict(target, keys, lowest) : freeVerdict(target, keys, lowest);
}

function exactVerdict(target: Target, keys: KeyNumber[], lowest: KeyNumber): Verdict {
  const findings = findingsOf(target, keys);
  const { unasked, ...found } = findings;
  const { kind, octavesOff } = kindOf(target, keys, findings);
  const isPlaced = kind === 'exact' || kind === 'register' || kind === 'inversion' || kind === 'spread';
  return {
    ...found, kind, octavesOff, foreign: [...found.foreign, ...unasked],
    isClean: found.missingEssential.length === 0 && found.foreign.length === 0 && found.avoid.length === 0,
    isRight: kind === 'exact',
    headline: HEADLINES[kind],
    details: kind === 'sus' ? susSentences(target, findings) : [
      ...placeSentences(target, kind, octavesOff, lowest),
      ...(isPlaced && findings.doubled.length === 0 ? [] : detailSentences(target, findings, lowest)),
    ],
  };
}

function kindOf(target: Target, keys: readonly KeyNumber[], findings: Findings): { kind: VerdictKind; octavesOff: number } {
  const fault = faultOf(target, findings);
  if (fault) return { kind: fault, octavesOff: 0 };
  const shift = sameShapeShift(target, keys);
  if (shift !== null) return { kind: shift === 0 ? 'exact' : 'register', octavesOff: shift / 12 };
  const hasOtherBass = stepAbove(target, keys[0] ?? 0) !== stepAbove(target, target.notes[0]?.key ?? 0);
  if (hasOtherBass) return { kind: 'inversion', octavesOff: 0 };
  return { kind: findings.doubled.length > 0 ? 'doubled' : 'spread', octavesOff: 0 };
}

function faultOf(target: Target, findings: Findings): VerdictKind | null {
  const { avoid, foreign, unasked, missing } = findings;
  if (isSus(target, findings)) return 'sus';
  if (avoid.length > 0) return 'avoid';
  if (foreign.length > 0 || unasked.length > 0) return 'foreign';
  return missing.length > 0 ? 'missing' : null;
}

/** Semitones by which the whole voicing lies elsewhere; null when the shape is another. */
function sameShapeShift({ notes }: Target, keys: readonly KeyNumber[]): number | null {
  const shift = (keys[0] ?? 0) - (notes[0]?.key ?? 0);
  const isSame = keys.length === notes.length && notes.every(({ key }, at) => keys[at] === key + shift);
  return isSame ? shift : null;
}

/** With no third, the fourth of a dominant is not a wrong note but a suspended chord (avoid-note table, V7). */
function isSus({ chord }: Target, { missing, avoid, soundsAs }: Findings): boolean {
  const isDominant = chord.degrees.includes('3') && chord.degrees.includes('b7');
  return isDominant && missing.includes('3') && avoid.every(({ degree }) => degree === '11') && (soundsAs?.includes('sus') ?? false);
}

function placeSentences(target: Target, kind: VerdictKind, octavesOff: number, lowest: KeyNumber): string[] {
  const count = ['', 'One octave', 'Two octaves'][Math.abs(octavesOff)] ?? `${Math.abs(octavesOff)} octaves`;
  const first = target.notes[0];
  if (kind === 'exact') return [presentSentence(target.notes.map(({ degree }) => degree))];
  if (kind === 'register') return [`${count} too ${octavesOff > 0 ? 'high' : 'low'}: begin on ${first ? printedNote(first.note) : ''}.`];
  if (kind === 'inversion') {
    const tone = toneOf(target, lowest);
    return [`${printedNote(tone.note)}, ${said(tone.degree)}, is in the bass; ${first ? `${printedNote(first.note)} belongs there` : ''}.`];
  }
  if (kind === 'spread') return [`From the bottom up it is ${andList(target.notes.map(({ note }) => printedNote(note)))}.`];
  return kind === 'doubled' ? ['Nothing is missing.'] : [];
}
