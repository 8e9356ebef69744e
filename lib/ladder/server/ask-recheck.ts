import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import { rebuildStudentRungs, standingOf } from '@/db/ladder-standing';
import { editionOfStudent, findRung } from '@/db/ladders';
import { findPerson, fullName } from '@/db/people';
import { insertRecheck } from '@/db/rung-history';
import { transaction } from '@/db/transaction';
import { AppError, notFound } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { assertCan } from '@/policies/ability';
import { hasRung } from '../rung-state';
import type { askRecheckSchema } from '../schema';

/**
 * The lead or the owner has a doubt about a passed rung: it is to be heard once more. Nothing is taken away, the
 * rung stays among the passed ones as "to be heard once more", and the next hearing decides. The reason is for
 * staff; the family reads only that it will be heard again.
 */
export async function askForRecheck({ studentId, rungId, reason }: z.output<typeof askRecheckSchema>, context: Context): Promise<{ recheckId: string }> {
  const { db, ability, actor, now, today } = context;
  assertCan(ability, 'create', 'Recheck', { studentId });
  return transaction(db, async (trx) => {
    const student = await findPerson(trx, studentId);
    const edition = student && (await editionOfStudent(trx, studentId));
    const rung = edition && (await findRung(trx, edition.id, rungId));
    if (!student || !rung) throw notFound('rung');
    const state = (await standingOf(trx, studentId, edition.id)).find((one) => one.rung === rungId)?.state;
    if (state === 'recheck_due') throw new AppError('conflict', 'This rung is to be heard once more already.');
    if (state === undefined || !hasRung(state)) throw new AppError('conflict', 'Only a passed rung can be heard once more; this one has not been passed.');
    const recheckId = newId();
    await insertRecheck(trx, { id: recheckId, studentId, rungId, reasonPrivate: reason, byId: actor.personId, askedOn: today, at: now });
    await rebuildStudentRungs(trx, studentId, edition.id);
    await recordAudit(trx, context, {
      action: 'ask_recheck', tableName: 'recheck_request', rowId: recheckId, reason,
      sentence: `Asked that ${fullName(student)} be heard once more at ${rung.code} ${rung.title}.`,
    });
    return { recheckId };
  });
}
