import { hasRung, type RungState } from './rung-state';

/**
 * How a rung of one edition lives on in the next. `same`: unchanged. `credited`: whoever had the old one is credited
 * the new. `kept`: a pass is kept, who is still at it meets the new text. `re_check`: kept, and heard once more.
 * `new`: stands in no earlier edition.
 */
export const MAPPING_RULES = { same: 'stays as it is', credited: 'credited to those who have the old one', kept: 'kept by those who passed; the others meet the new text', re_check: 'kept, and heard once more', new: 'new on the ladder' } as const;
export type MappingRule = keyof typeof MAPPING_RULES;

export type RungMapping = { from: string | null; to: string; rule: MappingRule };
export type OldStanding = { rung: string; state: RungState };
export type NewStanding = { rung: string; state: 'passed' | 'credited' | 'recheck_due' | 'working' | null };

/**
 * A student's standing in the next edition. Nothing passed becomes unpassed: what has no mapping blocks the
 * publishing instead (see `unmappedRungs`).
 */
export function standingAfter(standings: readonly OldStanding[], mappings: readonly RungMapping[]): NewStanding[] {
  const before = new Map(standings.map(({ rung, state }) => [rung, state]));
  const targets = [...new Set(mappings.map(({ to }) => to))];
  return targets.map((to) => ({ rung: to, state: best(mappings.filter((mapping) => mapping.to === to).map((mapping) => afterOne(mapping, before))) }));
}

const RANK = [null, 'working', 'recheck_due', 'credited', 'passed'] as const;
const best = (states: readonly NewStanding['state'][]): NewStanding['state'] => states.reduce<NewStanding['state']>((a, b) => (RANK.indexOf(b) > RANK.indexOf(a) ? b : a), null);

function afterOne({ from, rule }: RungMapping, before: ReadonlyMap<string, RungState>): NewStanding['state'] {
  const state = from === null ? undefined : before.get(from);
  if (state === undefined || rule === 'new') return null;
  if (!hasRung(state)) return state === 'working' ? 'working' : null;
  if (rule === 'credited') return 'credited';
  if (rule === 're_check' || state === 'recheck_due') return 'recheck_due';
  return state === 'credited' ? 'credited' : 'passed';
}

/** Rungs of the live edition that no line of the mapping leads on from: each must go somewhere before publishing. */
export const unmappedRungs = (oldRungs: readonly string[], mappings: readonly RungMapping[]): string[] =>
  oldRungs.filter((rung) => !mappings.some(({ from }) => from === rung));

export type Rehearsal = { studentId: string; hadBefore: number; ofBefore: number; hasAfter: number; ofAfter: number; /** of the new rungs they were past and now are not */ heldUpBy: string[] };

/**
 * Who gains and who is held up, before anything is published: rungs in hand before and after, and the new rungs that
 * now stand open below the highest one a student has.
 */
export function rehearse(studentId: string, standings: readonly OldStanding[], newOrder: readonly string[], mappings: readonly RungMapping[]): Rehearsal {
  const after = new Map(standingAfter(standings, mappings).map(({ rung, state }) => [rung, state]));
  const inHand = (rung: string) => ['passed', 'credited', 'recheck_due'].includes(after.get(rung) ?? '');
  const highest = newOrder.findLastIndex(inHand);
  return {
    studentId, hadBefore: standings.filter(({ state }) => hasRung(state)).length, ofBefore: standings.length, hasAfter: newOrder.filter(inHand).length, ofAfter: newOrder.length,
    heldUpBy: newOrder.slice(0, Math.max(0, highest)).filter((rung) => !inHand(rung) && mappings.some(({ to, rule }) => to === rung && rule === 'new')),
  };
}

/** A share in tenths of a percent, rounded half up: 13 of 21 is 61.9 %. */
export const sharePermille = (has: number, of: number): number => (of === 0 ? 0 : Math.round((has * 1000) / of));
