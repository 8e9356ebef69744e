import type { EpochSeconds, LocalDate } from '@/lib/time';
import type { Role } from '@/policies/ability';
import type { Db, Trx } from './connection';

export type Account = {
  id: string;
  personId: string;
  email: string;
  passwordHash: string | null;
  state: 'invited' | 'live' | 'disabled';
  sessionVersion: number;
  activeRole: Role | null;
  lastSignInAt: EpochSeconds | null;
};

type RoleGrantRow = { id: string; userId: string; role: Role; isLead: number; validFrom: LocalDate; validTo: LocalDate | null };
export type RoleGrant = { role: Role; isLead: boolean };

const accounts = (db: Db) => db<Account>('user_account');

export const findAccount = (db: Db, id: string): Promise<Account | undefined> => accounts(db).where({ id }).first();
export const findAccountByEmail = (db: Db, email: string): Promise<Account | undefined> =>
  accounts(db).where({ email: email.toLowerCase() }).first();
export const findAccountOfPerson = (db: Db, personId: string): Promise<Account | undefined> => accounts(db).where({ personId }).first();

export async function insertAccount(trx: Trx, account: Pick<Account, 'id' | 'personId' | 'email' | 'passwordHash' | 'state'>): Promise<void> {
  await trx('user_account').insert({ ...account, email: account.email.toLowerCase() });
}

export async function grantRole(trx: Trx, grant: { id: string; userId: string; role: Role; isLead?: boolean; validFrom?: LocalDate }): Promise<void> {
  const { isLead = false, validFrom = '2000-01-01', ...rest } = grant;
  await trx('role_grant').insert({ ...rest, isLead: isLead ? 1 : 0, validFrom }).onConflict(['user_id', 'role', 'valid_from']).ignore();
}

/** The hats this person may wear on this day, in the order of the ranks. */
export async function liveRoles(db: Db, userId: string, today: LocalDate): Promise<RoleGrant[]> {
  const rows = await db<RoleGrantRow>('role_grant').where({ userId }).andWhere('validFrom', '<=', today)
    .andWhere((query) => query.whereNull('validTo').orWhere('validTo', '>', today))
    .orderByRaw("instr('owner desk teacher guardian student', role)");
  return rows.map((row) => ({ role: row.role, isLead: row.isLead === 1 }));
}

export async function setActiveRole(trx: Trx, userId: string, activeRole: Role): Promise<void> {
  await trx('user_account').where({ id: userId }).update({ activeRole });
}

export async function setPassword(trx: Trx, userId: string, passwordHash: string): Promise<void> {
  await trx('user_account').where({ id: userId })
    .update({ passwordHash, state: 'live', sessionVersion: trx.raw('session_version + 1') });
}

/** Every older cookie stops working at the next request. */
export async function endAllSessions(trx: Trx, userId: string): Promise<void> {
  await trx('user_account').where({ id: userId }).update({ sessionVersion: trx.raw('session_version + 1') });
}

export async function noteSignIn(db: Db, userId: string, at: EpochSeconds): Promise<void> {
  await db('user_account').where({ id: userId }).update({ lastSignInAt: at });
}
