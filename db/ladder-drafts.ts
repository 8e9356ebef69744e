import type { MappingRule, RungMapping } from '@/lib/ladder/edition-change';
import type { Need } from '@/lib/ladder/needs';
import { isSpoken, type RungText } from '@/lib/ladder/play-spec';
import type { LocalDate } from '@/lib/time';
import type { Db, Trx } from './connection';
import type { Edition } from './ladders';

/** The edition that is being prepared, one at a time. */
export const draftEdition = (db: Db): Promise<Edition | undefined> =>
  db('ladder_edition as e').join('ladder as l', 'l.id', 'e.ladderId').where('e.state', 'draft').orderBy('e.createdAt', 'desc')
    .first<Edition | undefined>('e.id', 'e.ladderId', 'l.name as ladderName', 'l.subjectId', 'e.label', 'e.startsOn');

type Copy = { from: Edition; id: string; label: string; startsOn: LocalDate; createdBy: string; newId: () => string };

/** A draft begins as a copy of the live edition, every rung mapped to itself. */
export async function copyEdition(trx: Trx, { from, id, label, startsOn, createdBy, newId }: Copy): Promise<void> {
  await trx('ladder_edition').insert({ id, ladderId: from.ladderId, label, state: 'draft', startsOn, createdBy });
  const levels: { id: string; no: number; title: string; shortTitle: string; plainTitle: string }[] = await trx('level').where({ editionId: from.id }).orderBy('no').select('id', 'no', 'title', 'shortTitle', 'plainTitle');
  const levelIds = new Map(levels.map((level) => [level.id, newId()]));
  await trx('level').insert(levels.map((level) => ({ ...level, id: levelIds.get(level.id), editionId: id })));
  const texts: { levelId: string; rungId: string }[] = await trx('rung_text').where({ editionId: from.id }).orderBy('orderNo')
    .select('levelId', 'rungId', 'orderNo', 'title', 'plainTitle', 'canDo', 'soundsLike', 'playSpecJson', 'criteriaJson', 'keyPoolJson', 'keysDrawn', 'keysNeeded', 'evidenceKind');
  const copies = texts.map((text) => ({ ...text, id: newId(), editionId: id, levelId: levelIds.get(text.levelId) }));
  for (let at = 0; at < copies.length; at += 40) await trx('rung_text').insert(copies.slice(at, at + 40));
  const needs: Need[] = await trx('rung_need').where({ editionId: from.id }).select('rungId as rung', 'needsRungId as needs', 'kind');
  await insertNeeds(trx, id, needs);
  await trx('edition_map').insert(texts.map(({ rungId }) => ({ id: newId(), fromEditionId: from.id, fromRungId: rungId, toEditionId: id, toRungId: rungId, rule: 'same' })));
}

const insertNeeds = async (trx: Trx, editionId: string, needs: readonly Need[]): Promise<void> => {
  if (needs.length > 0) await trx('rung_need').insert(needs.map(({ rung, needs: needsRungId, kind }) => ({ editionId, rungId: rung, needsRungId, kind })));
};

export async function replaceNeeds(trx: Trx, editionId: string, rungId: string, needs: readonly Need[]): Promise<void> {
  await trx('rung_need').where({ editionId, rungId }).delete();
  await insertNeeds(trx, editionId, needs);
}


const toRow = ({ spec, criteria, keyPool, title, plainTitle, canDo, soundsLike, keysDrawn, keysNeeded }: RungText) => ({
  title, plainTitle, canDo, soundsLike, keysDrawn, keysNeeded, playSpecJson: JSON.stringify(spec), criteriaJson: JSON.stringify(criteria), keyPoolJson: JSON.stringify(keyPool),
  evidenceKind: isSpoken(spec.how) ? 'spoken' : criteria.tempo ? 'notes_and_time' : 'notes',
});

export async function updateRungText(trx: Trx, editionId: string, rungId: string, text: RungText): Promise<void> {
  await trx('rung_text').where({ editionId, rungId }).update(toRow(text));
}

export const rungByCode = (db: Db, ladderId: string, code: string): Promise<{ id: string } | undefined> =>
  db('rung').where({ ladderId, code }).first<{ id: string } | undefined>('id');

type NewRung = { id: string; textId: string; ladderId: string; editionId: string; levelId: string; /** the rung it stands behind; null: first of all */ afterRungId: string | null; text: RungText };

/** Puts a rung behind another one of the draft; those above move up by one. */
export async function insertRung(trx: Trx, { id, textId, ladderId, editionId, levelId, afterRungId, text }: NewRung): Promise<void> {
  await trx('rung').insert({ id, ladderId, code: text.code });
  const order: { rungId: string; orderNo: number }[] = await trx('rung_text').where({ editionId }).orderBy('orderNo', 'desc').select('rungId', 'orderNo');
  const place = order.find(({ rungId }) => rungId === afterRungId)?.orderNo ?? 0;
  for (const { rungId, orderNo } of order.filter((row) => row.orderNo > place)) await trx('rung_text').where({ editionId, rungId }).update({ orderNo: orderNo + 1 });
  await trx('rung_text').insert({ id: textId, editionId, levelId, rungId: id, orderNo: place + 1, ...toRow(text) });
}

/** Leaves a rung out of the draft; what needed it no longer does. The rung itself stays for those who passed it. */
export async function leaveOut(trx: Trx, editionId: string, rungId: string): Promise<void> {
  await trx('rung_need').where({ editionId, rungId }).delete();
  await trx('rung_need').where({ editionId, needsRungId: rungId }).delete();
  await trx('edition_map').where({ toEditionId: editionId, toRungId: rungId }).delete();
  await trx('rung_text').where({ editionId, rungId }).delete();
}

export const mappingsInto = async (db: Db, toEditionId: string): Promise<RungMapping[]> =>
  (await db('edition_map').where({ toEditionId }).select<{ from: string; to: string; rule: MappingRule }[]>('fromRungId as from', 'toRungId as to', 'rule'));

type Mapping = { id: string; fromEditionId: string; fromRungId: string; toEditionId: string; toRungId: string; rule: MappingRule };
export async function setMapping(trx: Trx, mapping: Mapping): Promise<void> {
  const { fromEditionId, fromRungId, toEditionId, toRungId, rule } = mapping;
  const changed = await trx('edition_map').where({ fromEditionId, fromRungId, toEditionId, toRungId }).update({ rule });
  if (changed === 0) await trx('edition_map').insert(mapping);
}

/** The draft goes live and the live one retires: one moment, one of each. */
export async function makeLive(trx: Trx, { from, to, startsOn }: { from: string; to: string; startsOn: LocalDate }): Promise<void> {
  await trx('ladder_edition').where({ id: from }).update({ state: 'retired' });
  await trx('ladder_edition').where({ id: to }).update({ state: 'live', startsOn });
}

export const climbersOn = async (db: Db, editionId: string): Promise<string[]> => {
  const rows: { studentId: string }[] = await db('student_ladder').where({ editionId }).select('studentId');
  return rows.map(({ studentId }) => studentId);
};

export async function moveClimber(trx: Trx, studentId: string, editionId: string): Promise<void> {
  await trx('student_ladder').where({ studentId }).update({ editionId });
}

type Credit = { id: string; studentId: string; rungId: string; reason: string; byId: string; creditedOn: LocalDate; at: number };
export async function creditByEdition(trx: Trx, credit: Credit): Promise<void> {
  await trx('rung_credit').insert({ ...credit, cause: 'edition' }).onConflict(['student_id', 'rung_id']).ignore();
}

type Recheck = { id: string; studentId: string; rungId: string; reasonPrivate: string; byId: string; askedOn: LocalDate; at: number };
export async function askRecheck(trx: Trx, recheck: Recheck): Promise<void> {
  await trx('recheck_request').insert(recheck);
}
