import 'server-only';
import type { Db } from '@/db/connection';
import { draftEdition, mappingsInto } from '@/db/ladder-drafts';
import { levelsOf, liveEdition, needsOf, rungsOf, type Edition, type Level, type Rung } from '@/db/ladders';
import { AppError } from '@/lib/errors';
import type { ChordStyle } from '@/lib/harmony/chord-name';
import type { Context } from '@/lib/server/context';
import { assertCan } from '@/policies/ability';
import { editionProblems, type EditionProblem } from '../edition-check';
import type { MappingRule, RungMapping } from '../edition-change';
import type { Need } from '../needs';

export type Draft = { live: Edition; edition: Edition; levels: Level[]; rungs: Rung[]; needs: Need[]; mappings: RungMapping[]; oldRungs: Rung[]; problems: EditionProblem[] };
export type DraftRungRow = Rung & { must: string[]; should: string[]; rule: MappingRule; isNew: boolean; isChanged: boolean };
export type DraftScreen = { label: string; liveLabel: string; levels: { id: string; no: number; title: string; rungs: DraftRungRow[] }[]; leftOut: { id: string; code: string; title: string; into: string[] }[]; problems: EditionProblem[]; chordStyle: ChordStyle };

/** The edition in preparation with everything that hangs on it. Throws when none is. */
export async function readDraft(db: Db): Promise<Draft> {
  const [live, edition] = [await liveEdition(db), await draftEdition(db)];
  if (!live || !edition) throw new AppError('conflict', 'No edition is being prepared.');
  const [levels, rungs, needs, stored, oldRungs] = [await levelsOf(db, edition.id), await rungsOf(db, edition.id), await needsOf(db, edition.id), await mappingsInto(db, edition.id), await rungsOf(db, live.id)];
  const fresh = rungs.filter(({ id }) => !stored.some(({ to }) => to === id)).map(({ id }): RungMapping => ({ from: null, to: id, rule: 'new' }));
  const mappings = [...stored, ...fresh];
  return { live, edition, levels, rungs, needs, mappings, oldRungs, problems: editionProblems({ rungs, needs, mappings, oldRungs }) };
}

/** What the editor shows; null while no edition is being prepared. */
export async function draftScreen({ db, ability, school }: Pick<Context, 'db' | 'ability' | 'school'>): Promise<DraftScreen | null> {
  assertCan(ability, 'update', 'Ladder', {});
  if (!(await draftEdition(db))) return null;
  const { live, edition, levels, rungs, needs, mappings, oldRungs, problems } = await readDraft(db);
  const before = new Map(oldRungs.map((rung) => [rung.id, rung]));
  const needsOfKind = (rungId: string, kind: Need['kind']) => needs.filter((need) => need.rung === rungId && need.kind === kind).map((need) => need.needs);
  const toRow = (rung: Rung): DraftRungRow => ({
    ...rung, must: needsOfKind(rung.id, 'must'), should: needsOfKind(rung.id, 'should'), isNew: !before.has(rung.id), isChanged: before.has(rung.id) && !isSameText(before.get(rung.id), rung),
    rule: mappings.find(({ from, to }) => from === rung.id && to === rung.id)?.rule ?? 'new',
  });
  const codes = new Map(rungs.map(({ id, code }) => [id, code]));
  return {
    label: edition.label, liveLabel: live.label, problems, chordStyle: school.chordStyle,
    levels: levels.map(({ id, no, title }) => ({ id, no, title, rungs: rungs.filter(({ levelId }) => levelId === id).map(toRow) })),
    leftOut: oldRungs.filter(({ id }) => !codes.has(id)).map(({ id, code, title }) => ({ id, code, title, into: mappings.filter(({ from }) => from === id).map(({ to }) => codes.get(to) ?? '') })),
  };
}

const asked = ({ title, plainTitle, canDo, soundsLike, spec, criteria, keyPool, keysDrawn, keysNeeded }: Rung): string =>
  JSON.stringify([title, plainTitle, canDo, soundsLike, spec, criteria, keyPool, keysDrawn, keysNeeded]);
const isSameText = (before: Rung | undefined, after: Rung): boolean => before !== undefined && asked(before) === asked(after);
