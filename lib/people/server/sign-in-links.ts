import 'server-only';
import { createHash, randomBytes } from 'node:crypto';
import type * as z from 'zod';
import { findAccount, findAccountByEmail, setPassword, type Account } from '@/db/accounts';
import { recordAudit } from '@/db/audit';
import type { Db, Trx } from '@/db/connection';
import { findSchool, type School } from '@/db/school';
import { clearFailures, failuresOf, noteFailure } from '@/db/sign-in-attempts';
import { findLiveLink, insertSignInLink, useLink, type SignInLink } from '@/db/sign-in-links';
import { transaction } from '@/db/transaction';
import { AppError } from '@/lib/errors';
import { queueMail } from '@/lib/messages/server/queue-mail';
import { env } from '@/lib/server/env';
import { newId } from '@/lib/server/ids';
import { hashPassword } from '@/lib/server/passwords';
import type { EpochSeconds } from '@/lib/time';
import type { setPasswordSchema } from '../schema';

type Moment = { db: Db; now: EpochSeconds };
const HOURS = { invitation: 7 * 24, reset: 1 } as const;
const SECRET_BYTES = 32;
const RESETS_PER_WINDOW = 3;

/** Only the hash is kept, so a copy of the database opens no account. */
const hashOf = (secret: string) => createHash('sha256').update(secret).digest('hex');

/** Writes a single-use link and the mail that carries it. An older link of the same purpose stops working. */
export async function mailLink(trx: Trx, account: Pick<Account, 'id' | 'personId'>, purpose: SignInLink['purpose'], { now, school }: { now: EpochSeconds; school: School }): Promise<void> {
  const secret = randomBytes(SECRET_BYTES).toString('base64url');
  const id = newId();
  await insertSignInLink(trx, { id, userId: account.id, purpose, secretHash: hashOf(secret), expiresAt: now + HOURS[purpose] * 3600 });
  const isInvitation = purpose === 'invitation';
  await queueMail(trx, { now, school }, { personId: account.personId }, {
    topic: isInvitation ? 'invitation' : 'password', key: `link:${id}`, subjectRef: account.id,
    subject: isInvitation ? `Your access to ${school.name}` : `A new password for ${school.name}`,
    lines: isInvitation
      ? [`${school.name} has made an account for you. Choose a password with this link; it works once, for seven days.`]
      : ['Somebody asked for a new password for this address. The link works once, for one hour.', 'If it was not you, do nothing: your password stays as it is.'],
    link: { label: 'Choose a password', url: `${env().NEXTAUTH_URL}/choose-password/${secret}` },
  });
}

/** Answers alike whether the address is known or not; at most three mails an address in a quarter of an hour. */
export async function requestReset({ email }: { email: string }, { db, now }: Moment): Promise<{ asked: true }> {
  const key = `reset:${email}`;
  const [account, school] = [await findAccountByEmail(db, email), await findSchool(db)];
  if (!account || !school || account.state === 'disabled' || (await failuresOf(db, key, now)).inWindow >= RESETS_PER_WINDOW) return { asked: true };
  await noteFailure(db, key, now);
  await transaction(db, (trx) => mailLink(trx, account, account.state === 'invited' ? 'invitation' : 'reset', { now, school }));
  return { asked: true };
}

/** Whether a link from a mail still opens something; the page says so before anybody types. */
export async function linkPurpose(secret: string, { db, now }: Moment): Promise<SignInLink['purpose'] | null> {
  const link = await findLiveLink(db, hashOf(secret), now);
  return link?.purpose ?? null;
}

/** Sets the password and ends every older session of the account. The link is used up in the same step. */
export async function setPasswordByLink({ token, password }: z.output<typeof setPasswordSchema>, { db, now }: Moment): Promise<{ email: string }> {
  const passwordHash = await hashPassword(password);
  return transaction(db, async (trx) => {
    const link = await findLiveLink(trx, hashOf(token), now);
    const account = link && (await findAccount(trx, link.userId));
    if (!link || !account || account.state === 'disabled' || !(await useLink(trx, link.id, now))) {
      throw new AppError('not_found', 'This link has been used or has run out. Ask for a new one on the sign-in page.');
    }
    await setPassword(trx, account.id, passwordHash);
    await clearFailures(trx, `account:${account.email}`);
    await recordAudit(trx, { actor: { personId: account.personId, role: 'self' }, now }, { action: 'password', tableName: 'user_account', rowId: account.id, sentence: 'Chose a new password; all older sessions ended.' });
    return { email: account.email };
  });
}
