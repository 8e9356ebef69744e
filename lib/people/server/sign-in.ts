import 'server-only';
import { findAccountByEmail, noteSignIn, type Account } from '@/db/accounts';
import type { Db } from '@/db/connection';
import { clearFailures, failuresOf, noteFailure } from '@/db/sign-in-attempts';
import { passwordMatches } from '@/lib/server/passwords';
import type { EpochSeconds } from '@/lib/time';

type Moment = { db: Db; now: EpochSeconds };
type Attempt = { email: string; password: string; address: string };
export type SignInResult = { ok: true; userId: string; sessionVersion: number } | { ok: false };

/** Guesses per quarter of an hour that reach the password check: per account and per network address. */
const ACCOUNT_LIMIT = 10;
const ADDRESS_LIMIT = 50;
/** After this many wrong passwords in all, only a mailed link opens the account (NIST SP 800-63B-4: at most 100). */
const ACCOUNT_TOTAL_LIMIT = 100;
const LONGEST_PASSWORD = 256;

/**
 * Checks an e-mail address and a password. Unknown and known accounts answer alike and take as long. A correct
 * password clears the account's count, so that the real owner is not kept out by a stranger for longer than the window.
 */
export async function signIn({ email, password, address }: Attempt, { db, now }: Moment): Promise<SignInResult> {
  const name = email.trim().toLowerCase().slice(0, 254);
  const keys = [`account:${name}`, `address:${address}`] as const;
  const [account, network] = [await failuresOf(db, keys[0], now), await failuresOf(db, keys[1], now)];
  const isThrottled = account.inWindow >= ACCOUNT_LIMIT || account.total >= ACCOUNT_TOTAL_LIMIT || network.inWindow >= ADDRESS_LIMIT;
  if (isThrottled || password.length === 0 || password.length > LONGEST_PASSWORD) return { ok: false };

  const found = await findAccountByEmail(db, name);
  const matches = await passwordMatches(storedHash(found), password);
  if (!found || !matches) {
    for (const key of keys) await noteFailure(db, key, now);
    return { ok: false };
  }
  await clearFailures(db, keys[0]);
  await noteSignIn(db, found.id, now);
  return { ok: true, userId: found.id, sessionVersion: found.sessionVersion };
}

const storedHash = (account: Account | undefined) => (account?.state === 'live' ? account.passwordHash : null);
