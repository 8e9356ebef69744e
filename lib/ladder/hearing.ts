import { plural } from '../format';
import { addDays, type LocalDate } from '../time';
import type { Verdict } from '../harmony/verdict';
import type { Criteria } from './play-spec';

/**
 * A hearing: planned (may begin) → keys_drawn (the seed is stored) → played (a proof is in) → decided. Stopped
 * for illness, distress or a broken instrument it counts as no attempt. Decided is for good: within ten minutes
 * another hearing may follow it and count in its place (undo.ts), later a re-check.
 */
export type HearingState = 'planned' | 'keys_drawn' | 'played' | 'decided' | 'stopped';
export type Outcome = 'passed' | 'not_yet';
export const OUTCOME_WORDS: Record<Outcome, string> = { passed: 'passed', not_yet: 'not yet' };

const MOVES: Record<HearingState, readonly HearingState[]> = {
  planned: ['keys_drawn', 'stopped'],
  keys_drawn: ['played', 'decided', 'stopped'],
  played: ['played', 'decided', 'stopped'],
  decided: [],
  stopped: [],
};
export const mayMove = (from: HearingState, to: HearingState): boolean => MOVES[from].includes(to);

/** What the keys of one chord told. A spoken answer has no keys, only the teacher's word. */
export type HeardChord = { symbol: string; played: number[]; milliseconds: number | null; verdict: Verdict | null; byEar: 'right' | 'not_right' | null };

/** Right notes, and within the seconds the rung allows. */
export function isHeardRight({ verdict, byEar, milliseconds }: HeardChord, { seconds }: Pick<Criteria, 'seconds'>): boolean {
  if (byEar !== null) return byEar === 'right';
  const isInTime = seconds === undefined || milliseconds === null || milliseconds <= seconds * 1000;
  return (verdict?.isRight ?? false) && isInTime;
}

/** A drawn key counts when all its chords are there and at most the allowed slips went wrong. */
export function isKeyHeard(chords: readonly HeardChord[], asked: number, criteria: Criteria): boolean {
  const right = chords.filter((chord) => isHeardRight(chord, criteria)).length;
  return chords.length === asked && right >= asked - criteria.slipsPerTurn;
}

export type KeyCount = { heard: number; /** of these, by the teacher's ear alone although the rung is played */ byEar: number; needed: number };

/**
 * Not heard enough keys, or enough only by ear? A pass then needs the teacher's reason in words: what stands in
 * place of the stored notes.
 */
export function passProblem({ heard: keysHeard, byEar, needed: keysNeeded }: KeyCount, reason: string): string | null {
  if (reason.trim() !== '' || keysHeard - byEar >= keysNeeded) return null;
  if (keysHeard >= keysNeeded) return `${plural(byEar, 'key was', 'keys were')} heard by ear, without stored notes. Say in a few words how it was heard, then it passes.`;
  return `${keysHeard} of the ${plural(keysNeeded, 'key')} needed ${keysHeard === 1 ? 'is' : 'are'} heard. Hear more, or say in words why it passes all the same.`;
}

/** The first day on which a rung may be heard again after "not yet": Tuesday 6 October and 7 days give 13 October. */
export const earliestRehearing = (decidedOn: LocalDate, waitDays: number): LocalDate => addDays(decidedOn, waitDays);

export type StartFacts = {
  /** Titles of the must-needs that are not passed. */
  missing: readonly string[];
  lastNotYetOn: LocalDate | null;
  attemptsThisTerm: number;
  today: LocalDate;
  waitDays: number;
  attemptsPerTerm: number;
};

/** What stands against hearing a rung today. Each may be set aside by the lead, with a reason. */
export type StartProblem = { kind: 'needs' | 'waiting' | 'attempts'; text: string; until: LocalDate | null };

export function startProblems({ missing, lastNotYetOn, attemptsThisTerm, today, waitDays, attemptsPerTerm }: StartFacts): StartProblem[] {
  const problems: StartProblem[] = [];
  if (missing.length > 0) problems.push({ kind: 'needs', text: `First comes: ${missing.join(', ')}.`, until: null });
  const earliest = lastNotYetOn === null ? null : earliestRehearing(lastNotYetOn, waitDays);
  if (earliest !== null && today < earliest) problems.push({ kind: 'waiting', text: 'The waiting days after “not yet” are not over.', until: earliest });
  if (attemptsThisTerm >= attemptsPerTerm) {
    problems.push({ kind: 'attempts', text: `Heard ${attemptsThisTerm === 1 ? 'once' : `${attemptsThisTerm} times`} this term; one more needs the lead.`, until: null });
  }
  return problems;
}
