import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import { findPerson, fullName, setReach } from '@/db/people';
import { transaction } from '@/db/transaction';
import { notFound } from '@/lib/errors';
import { reachWords } from '@/lib/harmony/reach';
import type { Context } from '@/lib/server/context';
import { assertCan } from '@/policies/ability';
import type { changeReachSchema } from '../schema';

/**
 * How far one hand of a student reaches, as measured by the teacher of the student, the lead or the owner. From then
 * on every voicing is shared between the hands by it; hearings under way take it at the next look at the screen.
 */
export async function changeReach({ studentId, reachSemitones }: z.output<typeof changeReachSchema>, context: Context): Promise<{ reachSemitones: number }> {
  assertCan(context.ability, 'update', 'Reach', { studentId });
  return transaction(context.db, async (trx) => {
    const student = await findPerson(trx, studentId);
    if (!student?.isStudent || student.state === 'erased') throw notFound('student');
    if (student.reachSemitones === reachSemitones) return { reachSemitones };
    await setReach(trx, studentId, reachSemitones);
    await recordAudit(trx, context, {
      action: 'change_reach', tableName: 'person', rowId: studentId, before: { reachSemitones: student.reachSemitones }, after: { reachSemitones },
      sentence: `Noted the hand of ${fullName(student)}: ${reachWords(reachSemitones)}.`,
    });
    return { reachSemitones };
  });
}
