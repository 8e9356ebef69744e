import type { LocalDate } from '@/lib/time';
import type { Db, Trx } from './connection';

export type Family = { id: string; name: string; legalEntityId: string; currency: string };

export async function insertFamily(trx: Trx, family: Family & { externalKey?: string; createdBy?: string | null }): Promise<void> {
  await trx('family').insert(family);
}

export async function insertPayer(trx: Trx, payer: { id: string; familyId: string; personId: string; orderNo?: number; billingAddress?: string; externalKey?: string }): Promise<void> {
  await trx('payer').insert(payer);
}

export type SplitPart = { payerId: string; bp: number };
/** Who pays how much of what, in basis points that add up to the whole. */
export async function insertPercentSplit(trx: Trx, rule: { id: string; familyId: string; chargeKind: string; parts: SplitPart[]; validFrom?: LocalDate; createdBy?: string | null }): Promise<void> {
  const { parts, ...rest } = rule;
  await trx('split_rule').insert({ ...rest, method: 'percent', partsJson: JSON.stringify(parts) });
}

export async function addStudentToFamily(trx: Trx, familyId: string, studentId: string): Promise<void> {
  await trx('family_student').insert({ familyId, studentId }).onConflict(['family_id', 'student_id']).ignore();
}

export const findFamily = (db: Db, id: string): Promise<Family | undefined> =>
  db<Family>('family').where({ id }).first('id', 'name', 'legalEntityId', 'currency');

export const familyOfStudent = (db: Db, studentId: string): Promise<Family | undefined> =>
  db('family_student as fs').join('family as f', 'f.id', 'fs.familyId').where('fs.studentId', studentId).where('f.state', 'live')
    .first('f.id', 'f.name', 'f.legalEntityId', 'f.currency');
