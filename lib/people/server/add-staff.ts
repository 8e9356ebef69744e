import 'server-only';
import type * as z from 'zod';
import { findAccountByEmail, grantRole, insertAccount } from '@/db/accounts';
import { recordAudit } from '@/db/audit';
import { insertContact, insertPerson } from '@/db/people';
import { transaction } from '@/db/transaction';
import { AppError } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { assertCan } from '@/policies/ability';
import { splitName } from '../names';
import type { newStaffSchema } from '../schema';
import { mailLink } from './sign-in-links';

/** Somebody for the desk, or another owner, who is not yet known to the school: a person, an account and the invitation. */
export async function addStaff(input: z.output<typeof newStaffSchema>, context: Context): Promise<{ userId: string }> {
  const { db, now, school, today } = context;
  assertCan(context.ability, 'create', 'Account', {});
  return transaction(db, async (trx) => {
    if (await findAccountByEmail(trx, input.email)) throw new AppError('conflict', 'Another account uses this address.', { email: ['Choose another address.'] });
    const [personId, userId] = [newId(), newId()];
    await insertPerson(trx, { id: personId, ...splitName(input.name) });
    await insertContact(trx, { id: newId(), personId, kind: 'email', value: input.email });
    await insertAccount(trx, { id: userId, personId, email: input.email, passwordHash: null, state: 'invited' });
    await grantRole(trx, { id: newId(), userId, role: input.role, validFrom: today });
    await mailLink(trx, { id: userId, personId }, 'invitation', { now, school });
    await recordAudit(trx, context, { action: 'invite', tableName: 'user_account', rowId: userId, sentence: `Invited ${input.name}.` });
    return { userId };
  });
}
