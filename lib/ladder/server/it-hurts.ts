import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import { findPerson } from '@/db/people';
import { insertLog, teachersOfStudent } from '@/db/practice';
import { progressReaders } from '@/db/ladder-standing';
import { transaction } from '@/db/transaction';
import { notFound } from '@/lib/errors';
import { queueMail } from '@/lib/messages/server/queue-mail';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { assertCan } from '@/policies/ability';
import type { itHurtsSchema } from '../schema';

/**
 * "This hurts": the playing ends, the teacher and, for a child, the guardians are told, and what was practised so far
 * is kept. No streak breaks and no mark is touched.
 */
export async function itHurts({ studentId, minutes, where }: z.output<typeof itHurtsSchema>, context: Context): Promise<{ told: number }> {
  const { db, ability, now, today } = context;
  assertCan(ability, 'create', 'Practice', { studentId });
  return transaction(db, async (trx) => {
    const student = await findPerson(trx, studentId);
    if (!student) throw notFound('student');
    const note = where === '' ? 'Stopped: it hurt.' : `Stopped: it hurt (${where}).`;
    await insertLog(trx, { id: newId(), studentId, practiceItemId: null, practisedOn: today, minutes, how: 'timed', feeling: 'hard', note, at: now });
    await recordAudit(trx, context, { action: 'hurt', tableName: 'practice_log', rowId: studentId, sentence: 'Said that playing hurts; practice was stopped.' });
    const name = student.calledName ?? student.givenName;
    let told = 0;
    for (const personId of new Set([...(await teachersOfStudent(trx, studentId)), ...(await progressReaders(trx, studentId))])) {
      const isNew = await queueMail(trx, context, { personId }, {
        topic: 'practice_hurt', key: `practice_hurt:${studentId}:${now}:${personId}`, subjectRef: `student:${studentId}`, subject: `${name} said that playing hurts`,
        lines: [`${name} stopped practising because it hurt${where === '' ? '' : ` (${where})`}.`, 'Please talk about it before the next practice. If it does not go away or comes back, a doctor should look at it.'],
      });
      if (isNew) told += 1;
    }
    return { told };
  });
}
