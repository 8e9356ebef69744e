import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import { findPeople, fullName } from '@/db/people';
import { staffPapers, type StaffPaper } from '@/db/staff-papers';
import { insertStaffDocument } from '@/db/teachers';
import { transaction } from '@/db/transaction';
import { AppError } from '@/lib/errors';
import { listOf } from '@/lib/format';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { assertCan } from '@/policies/ability';
import type { backgroundCheckSchema } from '../schema';

export async function readStaffPapers({ db, ability }: Context): Promise<StaffPaper[]> {
  assertCan(ability, 'read', 'Account', {});
  return staffPapers(db);
}

/**
 * Records that the owner has seen a valid background check. Nobody without one is planned with a student under age;
 * the paper itself and what it must say follow local law.
 */
export async function recordBackgroundCheck(input: z.output<typeof backgroundCheckSchema>, context: Context): Promise<{ count: number }> {
  const { db, today, school } = context;
  assertCan(context.ability, 'update', 'Account', {});
  if (input.issuedOn > today) throw new AppError('invalid', 'A check cannot be issued in the future.', { issuedOn: ['Choose today or an earlier day.'] });
  if (input.expiresOn <= today) throw new AppError('invalid', 'This check has run out already.', { expiresOn: ['Choose a later day.'] });
  const staff = new Set((await staffPapers(db)).map(({ personId }) => personId));
  const people = (await findPeople(db, input.personIds)).filter(({ id }) => staff.has(id));
  if (people.length === 0) throw new AppError('invalid', 'Choose at least one teacher.', { personIds: ['Choose at least one teacher.'] });
  await transaction(db, async (trx) => {
    for (const person of people) await insertStaffDocument(trx, { id: newId(), personId: person.id, kind: 'background_check', issuedOn: input.issuedOn, expiresOn: input.expiresOn });
    await recordAudit(trx, context, { action: 'check', tableName: 'staff_document', rowId: people[0]?.id ?? '', after: input, sentence: `Saw the background check of ${listOf(people.map(fullName), school.locale)}, valid to ${input.expiresOn}.` });
  });
  return { count: people.length };
}
