import type { EpochSeconds, LocalDate } from '@/lib/time';
import type { Trx } from './connection';

/** A room's equipment with its number, where there is more than one. */
export async function setFeatureQuantity(trx: Trx, roomId: string, featureId: string, quantity: number): Promise<void> {
  await trx('room_feature').insert({ roomId, featureId, quantity }).onConflict(['room_id', 'feature_id']).merge();
}

/** A payer who turns out to be the student as well. */
export async function becomeStudent(trx: Trx, id: string, { externalKey, bornOn }: { externalKey: string; bornOn: LocalDate | null }): Promise<void> {
  await trx('person').where({ id }).update({ isStudent: 1, externalKey, bornOn });
}

export type RungCredit = { id: string; studentId: string; rungId: string; reason: string; byId: string; creditedOn: LocalDate; at: EpochSeconds };
/** A student who begins above the bottom has the rungs below credited by placement. */
export async function insertPlacementCredits(trx: Trx, credits: readonly RungCredit[]): Promise<void> {
  for (let at = 0; at < credits.length; at += 100) await trx('rung_credit').insert(credits.slice(at, at + 100).map((credit) => ({ ...credit, cause: 'placement' })));
}
