import 'server-only';
import { accessList, disableAccount, endRoles, withoutAccess, type AccessRow, type WithoutAccess } from '@/db/access';
import { findAccount } from '@/db/accounts';
import { recordAudit } from '@/db/audit';
import { transaction } from '@/db/transaction';
import { AppError, notFound } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import { assertCan } from '@/policies/ability';

export async function readAccess({ db, ability }: Context): Promise<{ accounts: AccessRow[]; without: WithoutAccess[] }> {
  assertCan(ability, 'read', 'Account', {});
  return { accounts: await accessList(db), without: await withoutAccess(db) };
}

/** Ends somebody's access at once, on every device. The last owner cannot be shut out. */
export async function endAccess({ userId }: { userId: string }, context: Context): Promise<void> {
  const { db, today, actor } = context;
  assertCan(context.ability, 'update', 'Account', { id: userId });
  const account = await findAccount(db, userId);
  if (!account) throw notFound('account');
  if (account.id === actor.userId) throw new AppError('conflict', 'You cannot end your own access. Ask another owner.');
  await transaction(db, async (trx) => {
    await endRoles(trx, userId, today);
    await disableAccount(trx, userId);
    await recordAudit(trx, context, { action: 'disable', tableName: 'user_account', rowId: userId, sentence: `Ended the access of ${account.email}.` });
  }).catch((error: unknown) => {
    if (error instanceof Error && error.message.includes('last_owner')) throw new AppError('conflict', 'The school needs at least one owner.');
    throw error;
  });
}
