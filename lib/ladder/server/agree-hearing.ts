import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import { insertAgreement } from '@/db/ladder-standing';
import { editionOfStudent, findRung } from '@/db/ladders';
import { findPerson, fullName } from '@/db/people';
import { transaction } from '@/db/transaction';
import { notFound } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { assertCan } from '@/policies/ability';
import type { agreeHearingSchema } from '../schema';

/** The lead lets one rung of one student be heard although a need, the waiting days or the attempts stand against it. Once. */
export async function agreeHearing(input: z.output<typeof agreeHearingSchema>, context: Context): Promise<{ agreementId: string }> {
  const { db, actor, now } = context;
  assertCan(context.ability, 'approve', 'Hearing', { studentId: input.studentId });
  const student = await findPerson(db, input.studentId);
  const edition = student && (await editionOfStudent(db, student.id));
  const rung = edition && (await findRung(db, edition.id, input.rungId));
  if (!student || !rung) throw notFound('hearing');
  const agreementId = newId();
  await transaction(db, async (trx) => {
    await insertAgreement(trx, { id: agreementId, studentId: student.id, rungId: rung.id, reason: input.reason, byId: actor.personId, at: now });
    await recordAudit(trx, context, {
      action: 'agree', tableName: 'hearing_agreement', rowId: agreementId, reason: input.reason,
      sentence: `Agreed that ${fullName(student)} may be heard at ${rung.code} ${rung.title}.`,
    });
  });
  return { agreementId };
}
