import type { EpochSeconds } from '@/lib/time';
import type { Db, Trx } from './connection';

export type SignInLink = {
  id: string; userId: string; purpose: 'invitation' | 'reset'; secretHash: string; expiresAt: EpochSeconds; usedAt: EpochSeconds | null;
};

export async function insertSignInLink(trx: Trx, link: Omit<SignInLink, 'usedAt'>): Promise<void> {
  // A newer link of the same purpose replaces the older ones.
  await trx('sign_in_link').where({ userId: link.userId, purpose: link.purpose, usedAt: null }).update({ usedAt: link.expiresAt });
  await trx('sign_in_link').insert(link);
}

export const findLiveLink = (db: Db, secretHash: string, now: EpochSeconds): Promise<SignInLink | undefined> =>
  db<SignInLink>('sign_in_link').where({ secretHash }).whereNull('usedAt').andWhere('expiresAt', '>', now).first();

export async function useLink(trx: Trx, id: string, now: EpochSeconds): Promise<boolean> {
  return (await trx('sign_in_link').where({ id }).whereNull('usedAt').update({ usedAt: now })) === 1;
}
