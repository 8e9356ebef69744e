import 'server-only';
import { countClimbers, rungCounts } from '@/db/ladder-standing';
import { levelsOf, liveEdition, needsOf, rungsOf, type Level, type Rung } from '@/db/ladders';
import type { Context } from '@/lib/server/context';
import { assertCan, may } from '@/policies/ability';
import type { Criteria } from '../play-spec';
import { hasRung } from '../rung-state';

export type SchoolRung = {
  id: string; code: string; title: string; plainTitle: string; canDo: string; soundsLike: string; criteria: Criteria; keysDrawn: number; keysNeeded: number;
  isSpoken: boolean; needs: { title: string; kind: 'must' | 'should' }[]; passed: number; working: number;
};
export type SchoolLevel = Omit<Level, 'id'> & { rungs: SchoolRung[] };
export type SchoolLadder = { ladderName: string; label: string; climbers: number; levels: SchoolLevel[]; mayInstall: boolean };

/** The whole ladder and how many students stand where: numbers only, no names. Null while there is none. */
export async function schoolLadder(context: Context): Promise<SchoolLadder | null> {
  const { db, ability } = context;
  assertCan(ability, 'read', 'Ladder', {});
  const edition = await liveEdition(db);
  if (!edition) return null;
  const [levels, rungs, needs, counts] = [await levelsOf(db, edition.id), await rungsOf(db, edition.id), await needsOf(db, edition.id), await rungCounts(db, edition.id)];
  const titles = new Map(rungs.map(({ id, code, title }) => [id, `${code} ${title}`]));
  const order = rungs.map(({ id }) => id);
  const count = (rungId: string, matches: (state: (typeof counts)[number]['state']) => boolean) =>
    counts.filter((row) => row.rungId === rungId && matches(row.state)).reduce((sum, row) => sum + row.count, 0);
  const toRung = ({ id, code, title, plainTitle, canDo, soundsLike, criteria, keysDrawn, keysNeeded, spec }: Rung): SchoolRung => ({
    id, code, title, plainTitle, canDo, soundsLike, criteria, keysDrawn, keysNeeded, isSpoken: spec.how === 'spell' || spec.how === 'name_tensions',
    needs: needs.filter(({ rung }) => rung === id).map((need) => ({ title: titles.get(need.needs) ?? '', kind: need.kind, at: order.indexOf(need.needs) }))
      .sort((a, b) => a.at - b.at).map(({ title, kind }) => ({ title, kind })),
    passed: count(id, hasRung), working: count(id, (state) => state === 'working'),
  });
  return {
    ladderName: edition.ladderName, label: edition.label, climbers: await countClimbers(db), mayInstall: may(ability, 'create', 'Ladder'),
    levels: levels.map(({ id, ...titlesOf }) => ({ ...titlesOf, rungs: rungs.filter(({ levelId }) => levelId === id).map(toRung) })),
  };
}
