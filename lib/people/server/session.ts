import 'server-only';
import { endAllSessions, liveRoles, setActiveRole } from '@/db/accounts';
import { transaction } from '@/db/transaction';
import { AppError } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import type { Role } from '@/policies/ability';

/** A person with several roles puts on another hat; only one they hold today. */
export async function switchHat({ role }: { role: Role }, { db, actor, today }: Context): Promise<{ role: Role }> {
  const roles = await liveRoles(db, actor.userId, today);
  if (!roles.some((grant) => grant.role === role)) throw new AppError('forbidden', 'You do not hold this role.');
  await transaction(db, (trx) => setActiveRole(trx, actor.userId, role));
  return { role };
}

/** Ends the session on every device: an old cookie is refused at its next request. */
export async function signOutEverywhere(_input: unknown, { db, actor }: Context): Promise<{ signedOut: true }> {
  await transaction(db, (trx) => endAllSessions(trx, actor.userId));
  return { signedOut: true };
}
