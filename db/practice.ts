import type { ReviewCard } from '@/lib/ladder/review';
import type { EpochSeconds, LocalDate } from '@/lib/time';
import type { Db, Trx } from './connection';

export type PracticeSet = { id: string; studentId: string; setBy: string; setByName: string; setOn: LocalDate; dueOn: LocalDate };
export type PracticeItem = { id: string; practiceSetId: string; orderNo: number; rungId: string | null; piece: string | null; keys: string[]; beatsPerMinute: number | null; minutes: number | null; howRight: string };
type ItemRow = Omit<PracticeItem, 'keys'> & { keysJson: string };

/** What the student has been given to practise until the next lesson; a newer set replaces an older one. */
export const liveSet = (db: Db, studentId: string): Promise<PracticeSet | undefined> =>
  db('practice_set as s').join('person as p', 'p.id', 's.setBy').where({ 's.studentId': studentId, 's.state': 'live' }).orderBy('s.createdAt', 'desc')
    .first<PracticeSet | undefined>('s.id', 's.studentId', 's.setBy', 's.setOn', 's.dueOn', db.raw("trim(coalesce(p.called_name, p.given_name) || ' ' || p.family_name) AS set_by_name"));

export const itemsOfSet = async (db: Db, practiceSetId: string): Promise<PracticeItem[]> => {
  const rows: ItemRow[] = await db('practice_item').where({ practiceSetId }).orderBy('orderNo').select('id', 'practiceSetId', 'orderNo', 'rungId', 'piece', 'keysJson', 'beatsPerMinute', 'minutes', 'howRight');
  return rows.map(({ keysJson, ...row }) => ({ ...row, keys: JSON.parse(keysJson) as string[] }));
};

type NewSet = Pick<PracticeSet, 'id' | 'studentId' | 'setBy' | 'setOn' | 'dueOn'> & { occurrenceId: string | null; createdAt: EpochSeconds };
export async function replaceSet(trx: Trx, set: NewSet, items: readonly PracticeItem[]): Promise<void> {
  await trx('practice_set').where({ studentId: set.studentId, state: 'live' }).update({ state: 'replaced' });
  await trx('practice_set').insert(set);
  await trx('practice_item').insert(items.map(({ keys, ...item }) => ({ ...item, keysJson: JSON.stringify(keys) })));
}

/** The student's own set that an item belongs to, live or replaced meanwhile; undefined when it is somebody else's. */
export const itemOfStudent = (db: Db, studentId: string, itemId: string): Promise<{ id: string } | undefined> =>
  db('practice_item as i').join('practice_set as s', 's.id', 'i.practiceSetId').where({ 'i.id': itemId, 's.studentId': studentId }).first<{ id: string } | undefined>('i.id');

export type PracticeLog = { id: string; studentId: string; practiceItemId: string | null; practisedOn: LocalDate; minutes: number; how: 'timed' | 'told'; feeling: 'easy' | 'fine' | 'hard' | null; note: string; at: EpochSeconds };
export async function insertLog(trx: Trx, log: PracticeLog): Promise<void> {
  await trx('practice_log').insert(log);
}
export const logsSince = (db: Db, studentId: string, from: LocalDate): Promise<PracticeLog[]> =>
  db<PracticeLog>('practice_log').where({ studentId }).andWhere('practisedOn', '>=', from).orderBy('at', 'desc').select('id', 'studentId', 'practiceItemId', 'practisedOn', 'minutes', 'how', 'feeling', 'note', 'at');

export type StoredCard = ReviewCard & { id: string; rungId: string };

/** Review cards of the rungs a student has in hand: one whose pass was taken back does not come up. */
export const cardsOf = (db: Db, studentId: string): Promise<StoredCard[]> =>
  db('review_card as c').join('student_rung as s', (join) => join.on('s.studentId', 'c.studentId').andOn('s.rungId', 'c.rungId'))
    .where('c.studentId', studentId).whereIn('s.state', ['passed', 'credited', 'recheck_due']).orderBy(['c.dueOn', 'c.box'])
    .select<StoredCard[]>('c.id', 'c.rungId', 'c.box', 'c.dueOn', 'c.failuresInRow');

/** A rung enters the review once; passed again after a re-check it keeps its place. */
export async function enterReview(trx: Trx, card: ReviewCard & { id: string; studentId: string; rungId: string }): Promise<void> {
  await trx('review_card').insert(card).onConflict(['student_id', 'rung_id']).ignore();
}

type Review = { id: string; reviewCardId: string; doneOn: LocalDate; isGood: boolean; heard: unknown; at: EpochSeconds };
export async function recordReview(trx: Trx, { isGood, heard, ...review }: Review, { box, dueOn, failuresInRow }: ReviewCard): Promise<void> {
  await trx('review_done').insert({ ...review, isGood: isGood ? 1 : 0, heardJson: JSON.stringify(heard) });
  await trx('review_card').where({ id: review.reviewCardId }).update({ box, dueOn, failuresInRow });
}

/** Teachers of a student's running enrolments. */
export const teachersOfStudent = async (db: Db, studentId: string): Promise<string[]> => {
  const rows: { teacherId: string }[] = await db('enrolment').where({ studentId }).whereIn('state', ['active', 'paused', 'notice_given']).whereNotNull('teacherId').distinct('teacherId').select('teacherId');
  return rows.map(({ teacherId }) => teacherId);
};
