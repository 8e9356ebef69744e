import type { EpochSeconds, LocalDate } from '@/lib/time';
import type { Db, Trx } from './connection';

export type OpeningOffer = {
  id: string; enquiryId: string | null; studentId: string | null; teacherId: string; roomId: string; siteId: string; subjectId: string | null;
  localDate: LocalDate; startMin: number; lengthMinutes: number; zone: string; isWeekly: boolean; heldUntil: EpochSeconds;
  state: 'held' | 'accepted' | 'lapsed' | 'withdrawn';
};
type Row = Omit<OpeningOffer, 'isWeekly'> & { isWeekly: number };
const toOffer = (row: Row): OpeningOffer => ({ ...row, isWeekly: row.isWeekly === 1 });

export async function insertOffer(trx: Trx, { isWeekly, ...offer }: OpeningOffer & { createdBy: string }): Promise<void> {
  await trx('opening_offer').insert({ ...offer, isWeekly: isWeekly ? 1 : 0 });
}
export async function findOffer(db: Db, id: string): Promise<OpeningOffer | undefined> {
  const row = await db<Row>('opening_offer').where({ id }).first();
  return row && toOffer(row);
}
export async function setOfferState(trx: Trx, id: string, state: OpeningOffer['state']): Promise<void> {
  await trx('opening_offer').where({ id }).update({ state });
}
export async function offersOfEnquiry(db: Db, enquiryId: string): Promise<OpeningOffer[]> {
  const rows: Row[] = await db<Row>('opening_offer').where({ enquiryId, state: 'held' }).orderBy('localDate');
  return rows.map(toOffer);
}
export async function lapsedOffers(db: Db, now: EpochSeconds): Promise<OpeningOffer[]> {
  const rows: Row[] = await db<Row>('opening_offer').where({ state: 'held' }).where('heldUntil', '<=', now);
  return rows.map(toOffer);
}
