import { degreeWords, printedDegree, type Degree } from './degree';
import type { Findings } from './findings';
import { printedNote } from './note';
import { spellingOf, type Target } from './target';
import type { HeardTone } from './verdict';

export const andList = (words: readonly string[]): string =>
  words.length < 2 ? words.join('') : `${words.slice(0, -1).join(', ')} and ${words.at(-1)}`;

/** "the ♭7 (B♭)": the degree and its letter, from the asked chord. */
export const named = (target: Target, degree: Degree): string => `${said(degree)} (${printedNote(spellingOf(target, degree))})`;
export const said = (degree: Degree): string => (degree === '1' ? 'the root' : `the ${degreeWords(degree)}`);
const upper = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

/** "Root, 11, ♭7, ♭3 and 5 all present." */
export const presentSentence = (degrees: readonly Degree[]): string =>
  upper(`${andList(degrees.map((degree) => (degree === '1' ? 'root' : printedDegree(degree))))} ${degrees.length === 2 ? 'both' : 'all'} present.`);

function missingSentence(target: Target, { missing, missingEssential }: Findings): string[] {
  if (missing.length === 0) return [];
  const verb = missing.length === 1 ? 'is' : 'are';
  const ease = missingEssential.length === 0 && missing.every((degree) => degree === '5') ? ' The chord is whole without it; this voicing has it.' : '';
  return [`${upper(andList(missing.map((degree) => named(target, degree))))} ${verb} missing.${ease}`];
}

const avoidSentence = (target: Target, tone: HeardTone): string => {
  const third = target.chord.degrees.includes('3') ? '3' : target.chord.degrees.includes('b3') ? 'b3' : null;
  const clash = tone.degree === '11' && third ? ` a half step above ${named(target, third)}` : ' a half step from a chord tone';
  return `${printedNote(tone.note)} is the ${degreeWords(tone.degree)}: it clashes,${clash}. Leave it out.`;
};

const unaskedSentence = (tone: HeardTone, isLowest: boolean): string =>
  `${upper(said(tone.degree))} ${printedNote(tone.note)} is ${isLowest ? 'in the bass' : 'played'}; this voicing leaves it out.`;

const STEP_WORDS = ['', 'a half step', 'a whole step', 'three half steps'] as const;

/** "Move F a half step down to E, the 3rd.": when a wrong key lies beside a key that is missing. */
function moveSentence(target: Target, tone: HeardTone, { missing }: Findings): string | null {
  const goals = target.notes.filter(({ degree, key }) => missing.includes(degree) && Math.abs(key - tone.key) <= 3);
  const goal = goals.sort((a, b) => Math.abs(a.key - tone.key) - Math.abs(b.key - tone.key))[0];
  if (!goal) return null;
  const distance = goal.key - tone.key;
  return `Move ${printedNote(tone.note)} ${STEP_WORDS[Math.abs(distance)]} ${distance < 0 ? 'down' : 'up'} to ${printedNote(spellingOf(target, goal.degree))}, ${said(goal.degree)}.`;
}

/** The fourth in place of the third is named as the chord it makes; it is not scolded as a wrong note. */
export function susSentences(target: Target, findings: Findings): string[] {
  const moves = findings.avoid.map((tone) => moveSentence(target, tone, findings)).filter((text) => text !== null);
  return ['The 3rd is missing and the 4th stands in its place.', `It sounds as ${findings.soundsAs ?? 'a suspended chord'}.`, ...moves];
}

/** Everything found, in words a student can act on; the asked chord spells every name. */
export function detailSentences(target: Target, findings: Findings, lowest: number): string[] {
  const { avoid, foreign, unasked, doubled } = findings;
  const moves = [...avoid, ...foreign, ...unasked].map((tone) => moveSentence(target, tone, findings)).filter((text) => text !== null);
  return [
    ...avoid.map((tone) => avoidSentence(target, tone)),
    ...foreign.map((tone) => `${printedNote(tone.note)} is the ${degreeWords(tone.degree)}, not in this voicing.`),
    ...unasked.map((tone) => unaskedSentence(tone, tone.key === lowest)),
    ...missingSentence(target, findings),
    ...(findings.soundsAs !== null && (foreign.length > 0 || avoid.length > 0) ? [`It sounds as ${findings.soundsAs}.`] : []),
    ...doubled.map((tone) => `${upper(said(tone.degree))} ${printedNote(tone.note)} is played twice; once is enough.`),
    ...[...new Set(moves)],
  ];
}
