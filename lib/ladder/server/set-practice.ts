import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import { editionOfStudent, rungsOf, type Rung } from '@/db/ladders';
import { findPerson, fullName } from '@/db/people';
import { replaceSet } from '@/db/practice';
import { transaction } from '@/db/transaction';
import { AppError, notFound } from '@/lib/errors';
import { plural } from '@/lib/format';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { assertCan } from '@/policies/ability';
import type { setPracticeSchema } from '../schema';

type Setting = z.output<typeof setPracticeSchema>;

/** What a student practises until the next lesson. It takes the place of what was set before; what was practised of that stays in the log. */
export async function setPractice({ studentId, dueOn, items }: Setting, context: Context): Promise<{ practiceSetId: string }> {
  const { db, ability, actor, now, today } = context;
  assertCan(ability, 'create', 'Practice', { studentId });
  if (actor.role === 'student') throw new AppError('forbidden', 'What to practise is set by the teacher.');
  if (dueOn < today) throw new AppError('invalid', 'This day is over; choose a later one.', { dueOn: ['Choose today or a later day.'] });
  return transaction(db, async (trx) => {
    const student = await findPerson(trx, studentId);
    if (!student) throw notFound('student');
    const edition = await editionOfStudent(trx, studentId);
    const rungs = edition ? await rungsOf(trx, edition.id) : [];
    const practiceSetId = newId();
    const rows = items.map(({ rungId, piece, keys, ...item }, orderNo) => {
      assertOnLadder(rungs, rungId, keys, orderNo);
      return { ...item, id: newId(), practiceSetId, orderNo, keys, rungId: rungId || null, piece: piece || null };
    });
    await replaceSet(trx, { id: practiceSetId, studentId, setBy: actor.personId, setOn: today, dueOn, occurrenceId: null, createdAt: now }, rows);
    await recordAudit(trx, context, { action: 'create', tableName: 'practice_set', rowId: practiceSetId, sentence: `Set ${plural(items.length, 'thing')} to practise for ${fullName(student)}.` });
    return { practiceSetId };
  });
}

function assertOnLadder(rungs: readonly Rung[], rungId: string, keys: readonly string[], at: number): void {
  if (rungId === '') return;
  const rung = rungs.find(({ id }) => id === rungId);
  if (!rung) throw new AppError('invalid', 'One of the rungs is not on this student’s ladder.', { [`items.${at}.rungId`]: ['Choose a rung of the ladder.'] });
  const strange = keys.filter((key) => !rung.keyPool.includes(key));
  if (strange.length > 0) throw new AppError('invalid', `${rung.title} is not asked in ${strange.join(', ')}.`, { [`items.${at}.keys`]: [`Choose among ${rung.keyPool.join(', ')}.`] });
}
