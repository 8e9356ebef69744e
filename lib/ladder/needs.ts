/** "9.4 needs 9.2" (must) or "9.4 is easier after 9.3" (should). */
export type Need = { rung: string; needs: string; kind: 'must' | 'should' };

/**
 * A ladder may not lead in circles. Answers the rungs of one circle, in order, or null when there is none; an
 * edition with a circle cannot go live.
 */
export function findCircle(needs: readonly Need[]): string[] | null {
  const next = new Map<string, string[]>();
  for (const { rung, needs: needed } of needs) next.set(rung, [...(next.get(rung) ?? []), needed]);
  const done = new Set<string>();
  const walk = (rung: string, path: readonly string[]): string[] | null => {
    if (path.includes(rung)) return [...path.slice(path.indexOf(rung)), rung];
    if (done.has(rung)) return null;
    for (const needed of next.get(rung) ?? []) {
      const circle = walk(needed, [...path, rung]);
      if (circle) return circle;
    }
    done.add(rung);
    return null;
  };
  for (const rung of next.keys()) {
    const circle = walk(rung, []);
    if (circle) return circle;
  }
  return null;
}

/** Rungs that nobody could ever open, because what they need is not on the ladder. */
export function unreachableRungs(rungs: readonly string[], needs: readonly Need[]): string[] {
  const must = needs.filter(({ kind }) => kind === 'must');
  const reached = new Set<string>();
  for (;;) {
    const opened = rungs.filter((rung) => !reached.has(rung) && must.every((need) => need.rung !== rung || reached.has(need.needs)));
    if (opened.length === 0) return rungs.filter((rung) => !reached.has(rung));
    for (const rung of opened) reached.add(rung);
  }
}

/** The must-needs of a rung that are not passed yet. */
export const missingNeeds = (rung: string, needs: readonly Need[], passed: ReadonlySet<string>): string[] =>
  needs.filter((need) => need.rung === rung && need.kind === 'must' && !passed.has(need.needs)).map(({ needs: needed }) => needed);
