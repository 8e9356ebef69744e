import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import { addEnquiryEvent, insertEnquiry } from '@/db/enquiries';
import { allSubjects } from '@/db/lesson-types';
import { transaction } from '@/db/transaction';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { addDays } from '@/lib/time';
import { assertCan } from '@/policies/ability';
import type { deskEnquirySchema } from '../schema';

/** The desk takes an enquiry down while the caller is on the line. */
export async function takeEnquiry(input: z.output<typeof deskEnquirySchema>, context: Context): Promise<{ id: string }> {
  const { db, now, today, actor } = context;
  assertCan(context.ability, 'create', 'Enquiry', {});
  const id = newId();
  const { contactEmail, contactPhone, ...wish } = input;
  const [subject] = await allSubjects(db);
  await transaction(db, async (trx) => {
    await insertEnquiry(trx, {
      ...wish, id, contactEmail: contactEmail === '' ? null : contactEmail.toLowerCase(), contactPhone: contactPhone === '' ? null : contactPhone, subjectId: subject?.id ?? null,
      source: 'phone', state: 'new', nextStepOn: addDays(today, 1), createdAt: now,
    });
    await addEnquiryEvent(trx, { id: newId(), enquiryId: id, at: now, kind: 'received', text: 'Taken down at the desk.', byId: actor.personId });
    await recordAudit(trx, context, { action: 'create', tableName: 'enquiry', rowId: id, sentence: `Took down an enquiry for ${input.studentName}.` });
  });
  return { id };
}
