import type { Db, Trx } from './connection';

export const LESSON_TYPE_CODES = ['single', 'group', 'ensemble', 'workshop', 'drop_in', 'trial', 'make_up', 'rehearsal', 'recital', 'rental', 'tuning', 'meeting'] as const;
export type LessonTypeCode = (typeof LESSON_TYPE_CODES)[number];
export type LessonType = { id: string; code: LessonTypeCode; label: string; seatsMin: number; seatsMax: number; isTaught: boolean };
type Row = Omit<LessonType, 'isTaught'> & { isTaught: number };
export type Subject = { id: string; code: string; label: string };

const toLessonType = (row: Row): LessonType => ({ ...row, isTaught: row.isTaught === 1 });

export async function lessonTypeByCode(db: Db, code: LessonTypeCode): Promise<LessonType> {
  const row = await db<Row>('lesson_type').where({ code }).first('id', 'code', 'label', 'seatsMin', 'seatsMax', 'isTaught');
  if (!row) throw new Error(`the school has no lesson type ${code}`);
  return toLessonType(row);
}

export const taughtLessonTypes = async (db: Db): Promise<LessonType[]> =>
  (await db<Row>('lesson_type').where({ isTaught: 1 }).orderBy('label').select('id', 'code', 'label', 'seatsMin', 'seatsMax', 'isTaught')).map(toLessonType);

export const allSubjects = (db: Db): Promise<Subject[]> => db<Subject>('subject').orderBy('label').select('id', 'code', 'label');
/** What a lesson of this type must find in its room. */
export const requiredFeatures = (db: Db, lessonTypeId: string): Promise<{ code: string; label: string }[]> =>
  db('lesson_type_feature as t').join('feature as f', 'f.id', 't.featureId').where({ 't.lessonTypeId': lessonTypeId, 't.isRequired': 1 }).select('f.code', 'f.label');

export async function insertLessonTypes(trx: Trx, types: LessonType[]): Promise<void> {
  await trx('lesson_type').insert(types.map((type) => ({ ...type, isTaught: type.isTaught ? 1 : 0 })));
}
export async function insertSubject(trx: Trx, subject: Subject): Promise<void> {
  await trx('subject').insert(subject);
}
