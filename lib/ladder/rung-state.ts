import type { EpochSeconds, LocalDate } from '../time';
import { missingNeeds, type Need } from './needs';

/**
 * Where a student stands on a rung. Passed is never silently taken away: a doubt makes it "re-check due", and
 * only a later hearing decides.
 */
export type RungState = 'locked' | 'open' | 'working' | 'passed' | 'recheck_due' | 'credited';

export type RungFact =
  | { kind: 'hearing'; rung: string; outcome: 'passed' | 'not_yet'; at: EpochSeconds; on: LocalDate; hearingId: string }
  /** Begun and not decided: somebody is at it. */
  | { kind: 'begun'; rung: string; at: EpochSeconds; on: LocalDate; hearingId: string }
  /** From an earlier edition, a placement, or the lead's word. */
  | { kind: 'credit'; rung: string; at: EpochSeconds; on: LocalDate }
  | { kind: 'recheck'; rung: string; at: EpochSeconds; on: LocalDate };

export type StudentRung = { rung: string; state: RungState; since: LocalDate | null; hearingId: string | null };

export const hasRung = (state: RungState): boolean => state === 'passed' || state === 'credited' || state === 'recheck_due';

/** Every rung's state, from the facts alone: rebuilding it any time gives the same rows. */
export function rungStates(rungs: readonly string[], needs: readonly Need[], facts: readonly RungFact[]): StudentRung[] {
  const byRung = new Map<string, RungFact[]>();
  for (const fact of [...facts].sort((a, b) => a.at - b.at)) byRung.set(fact.rung, [...(byRung.get(fact.rung) ?? []), fact]);
  const own = rungs.map((rung) => factsState(rung, byRung.get(rung) ?? []));
  const passed = new Set(own.filter((state) => state !== null && hasRung(state.state)).map((state) => state?.rung ?? ''));
  return rungs.map((rung, at) => own[at] ?? { rung, state: missingNeeds(rung, needs, passed).length > 0 ? 'locked' : 'open', since: null, hearingId: null });
}

/** @param facts of one rung, oldest first; null when nothing has happened on it yet */
function factsState(rung: string, facts: readonly RungFact[]): StudentRung | null {
  let standing: StudentRung | null = null;
  for (const fact of facts) standing = after(rung, standing, fact);
  return standing;
}

type Hearing = Extract<RungFact, { kind: 'hearing' }>;

function after(rung: string, before: StudentRung | null, fact: RungFact): StudentRung | null {
  const had = before !== null && hasRung(before.state);
  if (fact.kind === 'hearing') return fact.outcome === 'passed' ? afterPass(rung, before, fact) : afterNotYet(rung, before, fact);
  if (fact.kind === 'recheck') return had ? { ...before, state: 'recheck_due', since: fact.on } : before;
  if (had) return before;
  if (fact.kind === 'credit') return { rung, state: 'credited', since: fact.on, hearingId: null };
  return { rung, state: 'working', since: before?.since ?? fact.on, hearingId: fact.hearingId };
}

const afterPass = (rung: string, before: StudentRung | null, { on, hearingId }: Hearing): StudentRung =>
  ({ rung, state: 'passed', since: before?.state === 'passed' ? before.since : on, hearingId });

function afterNotYet(rung: string, before: StudentRung | null, { on, hearingId }: Hearing): StudentRung {
  if (before !== null && hasRung(before.state)) return { ...before, state: 'recheck_due', since: on };
  return { rung, state: 'working', since: before?.since ?? on, hearingId };
}

/** The rungs a student may climb next: being worked on first, then open ones, each in the order of the ladder. */
export function nextRungs(states: readonly StudentRung[], count: number): StudentRung[] {
  const rank: Partial<Record<RungState, number>> = { working: 0, recheck_due: 1, open: 2 };
  return states.filter(({ state }) => rank[state] !== undefined)
    .map((rung, at) => ({ rung, at })).sort((a, b) => (rank[a.rung.state] ?? 9) - (rank[b.rung.state] ?? 9) || a.at - b.at)
    .slice(0, count).map(({ rung }) => rung);
}
