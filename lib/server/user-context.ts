import 'server-only';
import { findAccount, liveRoles, type RoleGrant } from '@/db/accounts';
import { ownRecords } from '@/db/actors';
import type { Db } from '@/db/connection';
import { findSchool, type School } from '@/db/school';
import { localDateOf, type EpochSeconds, type LocalDate } from '@/lib/time';
import { abilityFor, type Actor, type AppAbility, type Role } from '@/policies/ability';

/** All that an operation needs to know about the moment it runs in. Tests and jobs build their own. */
export type Context = {
  db: Db;
  actor: Actor;
  ability: AppAbility;
  now: EpochSeconds;
  /** Today at the school. */
  today: LocalDate;
  school: School;
};

export type SignedIn = Context & { roles: RoleGrant[] };

/** Who acts, read afresh each time: a role taken away counts at once. Null for an unknown or disabled account and for one without a live role. */
export async function contextOfUser(db: Db, userId: string, now: EpochSeconds, wanted?: Role): Promise<SignedIn | null> {
  const [account, school] = [await findAccount(db, userId), await findSchool(db)];
  if (!account || account.state !== 'live' || !school) return null;
  const today = localDateOf(now, school.zone);
  const roles = await liveRoles(db, account.id, today);
  const hat = roles.find(({ role }) => role === (wanted ?? account.activeRole)) ?? roles[0];
  if (!hat) return null;
  const own = await ownRecords(db, account.personId, hat.role, today);
  const actor: Actor = { userId: account.id, personId: account.personId, role: hat.role, isLead: hat.isLead, ...own };
  return { db, actor, ability: abilityFor(actor), now, today, school, roles };
}
