import { judge } from './judge';
import { seventhResolution, type Sounding } from './leading-words';
import type { KeyNumber } from './note';
import { targetName, type Target } from './target';
import type { Verdict } from './verdict';
import { leadingBetween, type Leading } from './voice-leading';

/** A key going down, in milliseconds after the first bar line; negative when it came before. */
export type KeyDown = { key: KeyNumber; atMs: number };

/** A chord of the sequence. The first voicing is the one on the page; the others count too, and are mentioned. */
export type AskedStep = { accepts: readonly [Target, ...Target[]]; alsoAccepts?: readonly Target[] };

export type SequenceLimits = {
  beatsPerMinute: number;
  beatsPerChord: number;
  /** The first key of a chord may come so far from its bar line. */
  onsetMs: number;
  /** From the first to the last key of one chord. */
  spreadMs: number;
  /** Semitones that all voices may move at a change. */
  movePerChange?: number;
  /** Every seventh falls by a step or stays. */
  sevenths?: 'resolve';
  /** Semitones of the top voice at each change, down is negative. */
  topMoves?: readonly number[];
};

export type StepHeard = { verdict: Verdict; keys: KeyNumber[]; /** null when nothing was played */ onsetOffsetMs: number | null; spreadMs: number; isAlternative: boolean; target: Target };
export type SequenceVerdict = {
  outcome: 'right' | 'right_with_note' | 'not_yet';
  steps: StepHeard[];
  changes: Leading[];
  /** As it was played, from the first to the last onset; null with fewer than two chords. */
  beatsPerMinute: number | null;
  problems: string[];
  notes: string[];
};

const MS_PER_MINUTE = 60_000;
export const barLengthMs = ({ beatsPerMinute, beatsPerChord }: Pick<SequenceLimits, 'beatsPerMinute' | 'beatsPerChord'>): number => (MS_PER_MINUTE / beatsPerMinute) * beatsPerChord;

/**
 * Hears chords in a row against what was asked, in time. Each key belongs to the bar line it is nearest to. Every
 * fault is said by itself: notes, late or early, not together, voices that move too far, sevenths that do not
 * resolve, the top line.
 */
export function judgeSequence(asked: readonly AskedStep[], played: readonly KeyDown[], limits: SequenceLimits): SequenceVerdict {
  const barMs = barLengthMs(limits);
  const steps = asked.map((step, at) => hearStep(step, played.filter(({ atMs }) => barOf(atMs, barMs, asked.length) === at), at * barMs));
  const changes = steps.slice(1).map(({ keys }, at) => leadingBetween(steps[at]?.keys ?? [], keys));
  const problems = [...steps.flatMap((step) => stepProblems(step, limits)), ...changes.flatMap((change, at) => changeProblems(change, at, steps, limits))];
  const notes = steps.filter(({ isAlternative }) => isAlternative).map(({ target }) => `${targetName(target)} was played another way; that counts too.`);
  const outcome = problems.length > 0 ? 'not_yet' : notes.length > 0 ? 'right_with_note' : 'right';
  return { outcome, steps, changes, beatsPerMinute: playedTempo(steps, limits), problems, notes };
}

const barOf = (atMs: number, barMs: number, count: number): number => Math.max(0, Math.min(count - 1, Math.round(atMs / barMs)));

function hearStep({ accepts, alsoAccepts = [] }: AskedStep, downs: readonly KeyDown[], barLineMs: number): StepHeard {
  const keys = [...new Set(downs.map(({ key }) => key))].sort((a, b) => a - b);
  const times = downs.map(({ atMs }) => atMs);
  const heard = [...accepts, ...alsoAccepts].map((target) => ({ target, verdict: judge(target, keys) }));
  const right = heard.find(({ verdict }) => verdict.isRight);
  const { target, verdict } = right ?? { target: accepts[0], verdict: heard[0]?.verdict ?? judge(accepts[0], keys) };
  const first = times.length > 0 ? Math.min(...times) : null;
  return { verdict, keys, target, isAlternative: alsoAccepts.includes(target), onsetOffsetMs: first === null ? null : Math.round(first - barLineMs), spreadMs: first === null ? 0 : Math.round(Math.max(...times) - first) };
}

function stepProblems({ verdict, target, onsetOffsetMs, spreadMs }: StepHeard, limits: SequenceLimits): string[] {
  const name = targetName(target);
  if (!verdict.isRight) return [`${name}: ${[verdict.headline, ...verdict.details].join(' ')}`];
  const problems: string[] = [];
  if (onsetOffsetMs !== null && Math.abs(onsetOffsetMs) > limits.onsetMs) problems.push(`${name} came ${Math.abs(onsetOffsetMs)} ms too ${onsetOffsetMs < 0 ? 'early' : 'late'}; up to ${limits.onsetMs} ms counts.`);
  if (spreadMs > limits.spreadMs) problems.push(`The keys of ${name} fell within ${spreadMs} ms; together means within ${limits.spreadMs} ms.`);
  return problems;
}

function changeProblems(change: Leading, at: number, steps: readonly StepHeard[], { movePerChange, sevenths, topMoves }: SequenceLimits): string[] {
  const [from, to] = steps.slice(at, at + 2);
  // A change between wrong chords says nothing new: the notes come first.
  if (!from || !to || [from, to].some(({ verdict }) => !verdict.isRight)) return [];
  const where = `From ${targetName(from.target)} to ${targetName(to.target)}`;
  const wanted = topMoves?.[at] ?? change.topMoves;
  const most = movePerChange ?? change.distance;
  return [
    change.distance > most ? `${where} the voices move ${change.distance} half steps in all; at most ${most} is asked.` : '',
    change.topMoves === wanted ? '' : `${where} the top voice should ${topWords(wanted)}.`,
    sevenths === 'resolve' ? unresolvedWords(from, to) : '',
  ].filter((text) => text !== '');
}

function unresolvedWords(from: StepHeard, to: StepHeard): string {
  const resolution = seventhResolution(soundingOf(from), soundingOf(to));
  return !resolution || resolution.isResolved ? '' : resolution.words;
}

const soundingOf = ({ target, keys }: StepHeard): Sounding => ({ target, keys });
const topWords = (semitones: number): string => (semitones === 0 ? 'stay' : `${semitones < 0 ? 'fall' : 'rise'} ${Math.abs(semitones) === 1 ? 'a half step' : `${Math.abs(semitones)} half steps`}`);

function playedTempo(steps: readonly StepHeard[], limits: SequenceLimits): number | null {
  const [first, last] = [steps[0]?.onsetOffsetMs, steps.at(-1)?.onsetOffsetMs];
  if (steps.length < 2 || first === null || last === null || first === undefined || last === undefined) return null;
  const playedMs = (steps.length - 1) * barLengthMs(limits) + last - first;
  return playedMs <= 0 ? null : Math.round((MS_PER_MINUTE * limits.beatsPerChord * (steps.length - 1)) / playedMs);
}
