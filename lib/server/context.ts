import 'server-only';
import { getServerSession } from 'next-auth';
import { forbidden, redirect } from 'next/navigation';
import { cache } from 'react';
import { findAccount, liveRoles, type RoleGrant } from '@/db/accounts';
import { ownRecords } from '@/db/actors';
import type { Db } from '@/db/connection';
import { findSchool, type School } from '@/db/school';
import { localDateOf, type EpochSeconds, type LocalDate } from '@/lib/time';
import { abilityFor, may, type Action, type Actor, type AppAbility, type Role, type SubjectName } from '@/policies/ability';
import { authOptions } from './auth';
import { database } from './database';

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

export const nowSeconds = (): EpochSeconds => Math.floor(Date.now() / 1000);

/** Who is asking, read afresh with each request: a role taken away or a session ended counts at once. */
export const currentContext = cache(async (): Promise<SignedIn | null> => {
  const session = await getServerSession(authOptions);
  if (!session?.userId) return null;
  return contextOfUser(database(), session.userId, nowSeconds());
});

/** Null for an unknown or disabled account and for one without a live role. */
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

export async function requireContext(): Promise<SignedIn> {
  const context = await currentContext();
  if (context) return context;
  return redirect((await findSchool(database())) ? '/sign-in' : '/set-up');
}

/** For pages: turns away people who could never use the screen. Operations still check each record. */
export async function requireContextTo(action: Action, name: SubjectName): Promise<SignedIn> {
  const context = await requireContext();
  return context.ability.can(action, name) ? context : forbidden();
}

/** For pages about one record whose owner is known from the address, such as a child's progress. */
export async function requireContextToRecord(action: Action, name: SubjectName, record: object): Promise<SignedIn | null> {
  const context = await requireContext();
  return may(context.ability, action, name, record) ? context : null;
}

declare module 'next-auth' {
  interface Session { userId?: string }
}
