import 'server-only';
import type * as z from 'zod';
import type { Trx } from '@/db/connection';
import { editionOfStudent, findRung } from '@/db/ladders';
import { findPerson } from '@/db/people';
import { cardsOf, insertLog, itemOfStudent, recordReview, teachersOfStudent, type StoredCard } from '@/db/practice';
import { transaction } from '@/db/transaction';
import { AppError, notFound } from '@/lib/errors';
import { queueMail } from '@/lib/messages/server/queue-mail';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import type { LocalDate } from '@/lib/time';
import { assertCan } from '@/policies/ability';
import { isGoodReview, judgePractice } from '../practice';
import { afterReview, tellsTeacher } from '../review';
import type { finishPracticeSchema } from '../schema';
import { keysToday } from './practice-today';

type Finishing = z.output<typeof finishPracticeSchema>;
export type Finished = { minutes: number; /** of a review */ isGood: boolean | null; nextDueOn: LocalDate | null };

/**
 * Keeps what was practised: the minutes, and of a review whether the rung still sits, judged here from the keys. A
 * review moves its card; two that fail in a row are told to the teacher. Practising never passes a rung and never
 * takes one away.
 */
export async function finishPractice(input: Finishing, context: Context): Promise<Finished> {
  const { db, ability, now, today } = context;
  assertCan(ability, 'create', 'Practice', { studentId: input.studentId });
  return transaction(db, async (trx) => {
    const practiceItemId = input.kind === 'set' ? await ownItem(trx, input) : null;
    const { minutes, how, feeling, note, studentId } = input;
    await insertLog(trx, { id: newId(), studentId, practiceItemId, practisedOn: today, minutes, how, feeling, note, at: now });
    return input.kind === 'review' ? reviewed(trx, context, input) : { minutes, isGood: null, nextDueOn: null };
  });
}

async function ownItem(trx: Trx, { studentId, itemId }: Finishing): Promise<string> {
  const item = await itemOfStudent(trx, studentId, itemId);
  if (!item) throw notFound('practice');
  return item.id;
}

async function reviewed(trx: Trx, context: Context, { studentId, itemId, minutes, played }: Finishing): Promise<Finished> {
  const { now, today } = context;
  const card = (await cardsOf(trx, studentId)).find(({ id }) => id === itemId);
  if (!card) throw notFound('review');
  if (card.dueOn > today) throw new AppError('conflict', 'This rung has been reviewed already; it comes back another day.');
  const edition = await editionOfStudent(trx, studentId);
  const rung = edition && (await findRung(trx, edition.id, card.rungId));
  if (!rung) throw notFound('rung');
  const drawn = await keysToday({ db: trx, today }, rung, { id: card.id, kind: 'review', keys: [], studentId });
  const judged = judgePractice(rung, drawn, played);
  const isGood = isGoodReview(judged);
  const next = afterReview(card, { doneOn: today, isGood });
  await recordReview(trx, { id: newId(), reviewCardId: card.id, doneOn: today, isGood, heard: judged, at: now }, next);
  if (!isGood && tellsTeacher(next)) await tellTeachers(trx, context, { studentId, card, title: rung.title });
  return { minutes, isGood, nextDueOn: next.dueOn };
}

async function tellTeachers(trx: Trx, context: Context, { studentId, card, title }: { studentId: string; card: StoredCard; title: string }): Promise<void> {
  const student = await findPerson(trx, studentId);
  const name = student?.calledName ?? student?.givenName ?? 'A student';
  for (const personId of await teachersOfStudent(trx, studentId)) {
    await queueMail(trx, context, { personId }, {
      topic: 'practice', key: `practice:${card.id}:${context.today}:${personId}`, subjectRef: `student:${studentId}`, subject: `${name}: ${title} does not sit any more`,
      lines: [`${name} reviewed “${title}” twice in a row without finding it again. It stays passed; a few minutes in the next lesson may help.`],
    });
  }
}
