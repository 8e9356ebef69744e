import type { Need } from '@/lib/ladder/needs';
import { criteriaSchema, playSpecSchema, type Criteria, type PlaySpec } from '@/lib/ladder/play-spec';
import type { LocalDate } from '@/lib/time';
import type { Db } from './connection';

export type Edition = { id: string; ladderId: string; ladderName: string; subjectId: string; label: string; startsOn: LocalDate };
export type Level = { id: string; no: number; title: string; shortTitle: string; plainTitle: string };
export type Rung = {
  id: string; code: string; levelId: string; levelNo: number; orderNo: number; title: string; plainTitle: string; canDo: string; soundsLike: string;
  spec: PlaySpec; criteria: Criteria; keyPool: string[]; keysDrawn: number; keysNeeded: number;
};
type RungRow = Omit<Rung, 'spec' | 'criteria' | 'keyPool'> & { playSpecJson: string; criteriaJson: string; keyPoolJson: string };

const toRung = ({ playSpecJson, criteriaJson, keyPoolJson, ...row }: RungRow): Rung => ({
  ...row, spec: playSpecSchema.parse(JSON.parse(playSpecJson)), criteria: criteriaSchema.parse(JSON.parse(criteriaJson)), keyPool: JSON.parse(keyPoolJson) as string[],
});

const editions = (db: Db) => db('ladder_edition as e').join('ladder as l', 'l.id', 'e.ladderId')
  .select<Edition[]>('e.id', 'e.ladderId', 'l.name as ladderName', 'l.subjectId', 'e.label', 'e.startsOn');

/** The edition that new students climb. */
export const liveEdition = (db: Db): Promise<Edition | undefined> => editions(db).where('e.state', 'live').orderBy('l.createdAt').first();

/** The edition a student climbs: the one they are on, else the live one. */
export async function editionOfStudent(db: Db, studentId: string): Promise<Edition | undefined> {
  const own = await editions(db).join('student_ladder as s', 's.editionId', 'e.id').where('s.studentId', studentId).orderBy('s.sinceOn', 'desc').first();
  return own ?? liveEdition(db);
}

export const levelsOf = (db: Db, editionId: string): Promise<Level[]> =>
  db<Level & { editionId: string }>('level').where({ editionId }).orderBy('no').select('id', 'no', 'title', 'shortTitle', 'plainTitle');

const rungRows = (db: Db) => db('rung_text as t').join('rung as r', 'r.id', 't.rungId').join('level as v', 'v.id', 't.levelId')
  .select<RungRow[]>('r.id', 'r.code', 't.levelId', 'v.no as levelNo', 't.orderNo', 't.title', 't.plainTitle', 't.canDo', 't.soundsLike', 't.playSpecJson', 't.criteriaJson',
    't.keyPoolJson', 't.keysDrawn', 't.keysNeeded');

/** All rungs of an edition, from the bottom up. */
export const rungsOf = async (db: Db, editionId: string): Promise<Rung[]> =>
  (await rungRows(db).where('t.editionId', editionId).orderBy('t.orderNo')).map(toRung);

export async function findRung(db: Db, editionId: string, rungId: string): Promise<Rung | undefined> {
  const row = await rungRows(db).where({ 't.editionId': editionId, 't.rungId': rungId }).first();
  return row && toRung(row);
}

export const needsOf = (db: Db, editionId: string): Promise<Need[]> =>
  db('rung_need').where({ editionId }).select<Need[]>('rungId as rung', 'needsRungId as needs', 'kind');
