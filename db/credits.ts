import type { LocalDate } from '@/lib/time';
import type { Db, Trx } from './connection';

export type MakeUpCredit = {
  id: string; studentId: string; enrolmentId: string; sourceSeatId: string; cause: 'family' | 'school' | 'owner'; minutes: number;
  bornOn: LocalDate; lastOn: LocalDate; countsToCap: number; state: 'live' | 'used' | 'expired' | 'cancelled';
};

export async function insertCredit(trx: Trx, credit: MakeUpCredit): Promise<void> {
  await trx('make_up_credit').insert(credit);
}
export const creditOfSeat = (db: Db, sourceSeatId: string): Promise<MakeUpCredit | undefined> => db<MakeUpCredit>('make_up_credit').where({ sourceSeatId }).first();

/** Credits that count to the family's cap, by lessons missed within the span. */
export async function countCappedCredits(db: Db, enrolmentId: string, from: LocalDate, until: LocalDate): Promise<number> {
  const [row]: { count: number }[] = await db('make_up_credit').where({ enrolmentId, countsToCap: 1 }).whereNot('state', 'cancelled')
    .whereBetween('bornOn', [from, until]).count('id as count');
  return row?.count ?? 0;
}

export async function usedMinutes(db: Db, creditId: string): Promise<number> {
  const [row]: { minutes: number | null }[] = await db('make_up_use').where({ creditId }).whereNull('reversedAt').sum('minutes as minutes');
  return row?.minutes ?? 0;
}

export async function reviveCredit(trx: Trx, id: string, change: Pick<MakeUpCredit, 'cause' | 'minutes' | 'lastOn' | 'countsToCap'>): Promise<void> {
  await trx('make_up_credit').where({ id }).update({ ...change, state: 'live' });
}
export async function cancelCredit(trx: Trx, id: string): Promise<void> {
  await trx('make_up_credit').where({ id }).update({ state: 'cancelled' });
}
export const liveCreditsOf = (db: Db, studentIds: readonly string[], today: LocalDate): Promise<MakeUpCredit[]> =>
  db<MakeUpCredit>('make_up_credit').whereIn('studentId', [...studentIds]).where({ state: 'live' }).where('lastOn', '>=', today).orderBy('lastOn');
