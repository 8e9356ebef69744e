import { FIRST_EDITION } from '@/lib/ladder/first-edition/edition';
import { findCircle, unreachableRungs, type Need } from '@/lib/ladder/needs';
import { isSpoken, type LevelSeed, type RungSeed } from '@/lib/ladder/play-spec';
import type { LocalDate } from '@/lib/time';
import type { Trx } from './connection';

type Install = { subjectId: string; startsOn: LocalDate; createdBy: string | null; newId: () => string };

const evidenceOf = ({ spec, criteria }: RungSeed) => (isSpoken(spec.how) ? 'spoken' : criteria.tempo ? 'notes_and_time' : 'notes');

/** Lays the ladder that ships and makes it live. Done once per school: a second time it answers the edition that is there. */
export async function installFirstLadder(trx: Trx, install: Install): Promise<{ editionId: string; isNew: boolean }> {
  const known = await trx('ladder_edition as e').join('ladder as l', 'l.id', 'e.ladderId').where('l.name', FIRST_EDITION.ladderName)
    .orderBy('e.createdAt').first<{ id: string } | undefined>('e.id');
  if (known) return { editionId: known.id, isNew: false };
  const { subjectId, startsOn, createdBy, newId } = install;
  const [ladderId, editionId] = [newId(), newId()];
  await trx('ladder').insert({ id: ladderId, name: FIRST_EDITION.ladderName, subjectId });
  await trx('ladder_edition').insert({ id: editionId, ladderId, label: FIRST_EDITION.label, state: 'draft', startsOn, createdBy });
  const rungIds = new Map(FIRST_EDITION.levels.flatMap(({ rungs }) => rungs).map(({ code }) => [code, newId()]));
  await trx('rung').insert([...rungIds].map(([code, id]) => ({ id, ladderId, code })));
  let orderNo = 0;
  for (const level of FIRST_EDITION.levels) orderNo = await insertLevel(trx, { level, editionId, orderNo, rungIds, newId });
  await insertNeeds(trx, editionId, rungIds);
  await trx('ladder_edition').where({ id: editionId }).update({ state: 'live' });
  return { editionId, isNew: true };
}

type LevelInsert = { level: LevelSeed; editionId: string; orderNo: number; rungIds: ReadonlyMap<string, string>; newId: () => string };

async function insertLevel(trx: Trx, { level, editionId, orderNo, rungIds, newId }: LevelInsert): Promise<number> {
  const { rungs, ...titles } = level;
  const levelId = newId();
  await trx('level').insert({ id: levelId, editionId, ...titles });
  await trx('rung_text').insert(rungs.map((rung, at) => ({
    id: newId(), editionId, levelId, rungId: rungIds.get(rung.code), orderNo: orderNo + at + 1, title: rung.title, plainTitle: rung.plainTitle, canDo: rung.canDo,
    soundsLike: rung.soundsLike, playSpecJson: JSON.stringify(rung.spec), criteriaJson: JSON.stringify(rung.criteria), keyPoolJson: JSON.stringify(rung.keyPool),
    keysDrawn: rung.keysDrawn, keysNeeded: rung.keysNeeded, evidenceKind: evidenceOf(rung),
  })));
  return orderNo + rungs.length;
}

/** An edition whose needs go in a circle, or that has a rung nobody can reach, does not go live. */
async function insertNeeds(trx: Trx, editionId: string, rungIds: ReadonlyMap<string, string>): Promise<void> {
  const needs = FIRST_EDITION.levels.flatMap(({ rungs }) => rungs).flatMap(({ code, must, should = [] }) => [
    ...must.map((needed): Need => ({ rung: code, needs: needed, kind: 'must' })), ...should.map((needed): Need => ({ rung: code, needs: needed, kind: 'should' })),
  ]);
  if (findCircle(needs) ?? unreachableRungs([...rungIds.keys()], needs)[0]) throw new Error('the needs of this edition do not form a ladder');
  await trx('rung_need').insert(needs.map(({ rung, needs: needed, kind }) => ({ editionId, rungId: rungIds.get(rung), needsRungId: rungIds.get(needed), kind })));
}
