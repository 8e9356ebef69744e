import type { SplitRule } from '@/lib/tuition/shares';
import type { LocalDate } from '@/lib/time';
import type { Db } from './connection';

export type Payer = { id: string; familyId: string; familyName: string; personId: string | null; name: string; address: string; billingEmail: string | null; currency: string; legalEntityId: string; state: 'live' | 'left' };

const NAME = "coalesce(y.organisation_name, trim(coalesce(p.called_name, p.given_name) || ' ' || p.family_name)) AS name";

const joined = (db: Db) => db('payer as y').join('family as f', 'f.id', 'y.familyId').leftJoin('person as p', 'p.id', 'y.personId')
  .select<Payer[]>('y.id', 'y.familyId', 'f.name as familyName', 'y.personId', 'y.billingAddress as address', 'y.billingEmail', 'f.currency', 'f.legalEntityId', 'y.state', db.raw(NAME));

export const findPayer = (db: Db, id: string): Promise<Payer | undefined> => joined(db).where('y.id', id).first();
/** The first in order pays what no rule gives to another. */
export const payersOfFamilies = (db: Db, familyIds: readonly string[]): Promise<Payer[]> =>
  joined(db).whereIn('y.familyId', [...familyIds]).where('y.state', 'live').orderBy(['y.familyId', 'y.orderNo', 'y.id']);
/** Every payer of the school, for the desk to take a payment from. */
export const livePayers = (db: Db): Promise<Payer[]> => joined(db).where('y.state', 'live').orderBy(['f.name', 'y.orderNo']);

type SplitRow = { familyId: string; chargeKind: string; method: SplitRule['method']; partsJson: string; remainderPayerId: string | null };
export type FamilySplit = { familyId: string; rule: SplitRule };

export async function splitRulesOn(db: Db, date: LocalDate): Promise<FamilySplit[]> {
  const rows: SplitRow[] = await db('split_rule').where('validFrom', '<=', date)
    .andWhere((query) => query.whereNull('validTo').orWhere('validTo', '>', date)).select('familyId', 'chargeKind', 'method', 'partsJson', 'remainderPayerId');
  return rows.map(({ familyId, chargeKind, method, partsJson, remainderPayerId }) =>
    ({ familyId, rule: { kind: chargeKind, method, parts: JSON.parse(partsJson) as unknown, remainderPayerId } as SplitRule }));
}
