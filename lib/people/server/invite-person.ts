import 'server-only';
import { findAccountByEmail, findAccountOfPerson, grantRole, insertAccount } from '@/db/accounts';
import { recordAudit } from '@/db/audit';
import { findPerson, fullName } from '@/db/people';
import { transaction } from '@/db/transaction';
import { AppError, notFound } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { assertCan, type Role } from '@/policies/ability';
import { mailLink } from './sign-in-links';

type Invitation = { personId: string; email: string; role: Role; isLead?: boolean };

/** Gives a person a hat. Somebody without an account gets one and a mail to choose a password; nobody gets two accounts. */
export async function invitePerson({ personId, email, role, isLead = false }: Invitation, context: Context): Promise<{ userId: string }> {
  const { db, now, school, today } = context;
  assertCan(context.ability, 'create', 'Account', { personId });
  const person = await findPerson(db, personId);
  if (!person) throw notFound('person');
  return transaction(db, async (trx) => {
    const existing = await findAccountOfPerson(trx, personId);
    const sameEmail = await findAccountByEmail(trx, email);
    if (sameEmail && sameEmail.personId !== personId) throw new AppError('conflict', 'Another account uses this address.', { email: ['Choose another address.'] });
    const userId = existing?.id ?? newId();
    if (!existing) await insertAccount(trx, { id: userId, personId, email, passwordHash: null, state: 'invited' });
    await grantRole(trx, { id: newId(), userId, role, isLead, validFrom: today });
    if (!existing || existing.state === 'invited') await mailLink(trx, { id: userId, personId }, 'invitation', { now, school });
    await recordAudit(trx, context, { action: 'invite', tableName: 'user_account', rowId: userId, sentence: `Gave ${fullName(person)} access as ${role}.` });
    return { userId };
  });
}
