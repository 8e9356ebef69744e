import { printedNote } from '../harmony/note';
import { asksOf } from './asks';
import { unmappedRungs, type RungMapping } from './edition-change';
import { findCircle, unreachableRungs, type Need } from './needs';
import type { RungText } from './play-spec';

export type DraftRung = RungText & { id: string };
export type EditionProblem = { rungId: string | null; text: string };

type Draft = { rungs: readonly DraftRung[]; needs: readonly Need[]; mappings: readonly RungMapping[]; /** of the live edition */ oldRungs: readonly { id: string; code: string }[] };

/** Everything that stands against publishing an edition, in sentences. Empty: it may go live. */
export function editionProblems({ rungs, needs, mappings, oldRungs }: Draft): EditionProblem[] {
  const codes = new Map([...oldRungs, ...rungs].map(({ id, code }) => [id, code]));
  const code = (id: string) => codes.get(id) ?? 'a rung';
  const circle = findCircle(needs);
  const unreachable = circle ? [] : unreachableRungs(rungs.map(({ id }) => id), needs);
  return [
    ...(rungs.length === 0 ? [{ rungId: null, text: 'The edition has no rung.' }] : []),
    ...(circle ? [{ rungId: circle[0] ?? null, text: `The needs lead in a circle: ${circle.map(code).join(' → ')}.` }] : []),
    ...unreachable.map((rungId) => ({ rungId, text: `${code(rungId)} can never open: it needs a rung that is not on this edition, or one that never opens.` })),
    ...rungs.flatMap((rung) => rungProblems(rung).map((text) => ({ rungId: rung.id, text: `${rung.code}: ${text}` }))),
    ...unmappedRungs(oldRungs.map(({ id }) => id), mappings).map((rungId) => ({ rungId, text: `${code(rungId)} of the live edition leads nowhere. Say which rung it becomes, so that nobody loses a pass.` })),
  ];
}

export function rungProblems({ plainTitle, canDo, soundsLike, keysDrawn, keysNeeded, keyPool, spec }: RungText): string[] {
  const missing = [['a short plain title', plainTitle], ['what one can do with it', canDo], ['what it sounds like', soundsLike]].filter(([, text]) => (text ?? '').trim().length < 3).map(([what]) => what);
  return [
    ...(missing.length > 0 ? [`guardians need plain words: ${missing.join(', ')}.`] : []),
    ...(keyPool.length === 0 ? ['it is asked in no key.'] : []),
    ...(keysNeeded > keysDrawn ? [`${keysNeeded} keys are needed and only ${keysDrawn} drawn.`] : []),
    ...keyPool.filter((key) => !fitsIn(spec, key)).map((key) => `it does not fit its place on the keyboard in ${printedNote(key)}. Widen the place.`),
  ];
}

function fitsIn(spec: RungText['spec'], key: string): boolean {
  try {
    spec.turns.forEach((_turn, turn) => asksOf(spec, { key, turn }));
    return true;
  } catch {
    return false;
  }
}
