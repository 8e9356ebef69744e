import type { Knex } from 'knex';
import type { LocalDate } from '@/lib/time';
import type { Db, Trx } from './connection';
import type { Treatment } from '@/lib/tuition/tax';

export type PriceLine = { id: string; productId: string; productLabel: string; kind: string; lengthMinutes: number | null; siteName: string | null; amountMinor: number; validFrom: LocalDate; validTo: LocalDate | null };

/** Every price with its dates, the newest first within a product. */
export const priceHistory = (db: Db): Promise<PriceLine[]> =>
  db('price as x').join('product as p', 'p.id', 'x.productId').leftJoin('site as w', 'w.id', 'x.siteId')
    .select<PriceLine[]>('x.id', 'x.productId', 'p.label as productLabel', 'p.kind', 'x.lengthMinutes', 'w.name as siteName', 'x.amountMinor', 'x.validFrom', 'x.validTo')
    .orderBy([{ column: 'p.label' }, { column: 'x.lengthMinutes' }, { column: 'x.validFrom', order: 'desc' }]);

type Dated = { validFrom: LocalDate };
/** The day on which a change that is planned already begins; null when none is. */
const plannedAfter = async (query: Knex.QueryBuilder, day: LocalDate): Promise<LocalDate | null> =>
  ((await query.where('validFrom', '>', day).orderBy('validFrom').first<Dated | undefined>('validFrom'))?.validFrom) ?? null;
const endOn = async (query: Knex.QueryBuilder, day: LocalDate): Promise<void> => {
  await query.where('validFrom', '<', day).andWhere((open) => open.whereNull('validTo').orWhere('validTo', '>', day)).update({ validTo: day });
};

/** The price before ends the day the new one begins, and the new one the day another is planned; a price of the same day is replaced. */
export async function changePrice(trx: Trx, price: { id: string; productId: string; lengthMinutes: number | null; amountMinor: number; validFrom: LocalDate; approvedBy: string }): Promise<void> {
  const same = () => trx('price').where({ productId: price.productId, lengthMinutes: price.lengthMinutes }).whereNull('siteId');
  await same().where({ validFrom: price.validFrom }).delete();
  await endOn(same(), price.validFrom);
  await trx('price').insert({ ...price, siteId: null, validTo: await plannedAfter(same(), price.validFrom) });
}

export type TaxLine = { id: string; taxClass: string; treatment: Treatment; rateBp: number; exemptionReason: string; validFrom: LocalDate; validTo: LocalDate | null; entityName: string };
export const taxHistory = (db: Db): Promise<TaxLine[]> =>
  db('tax_rate as t').join('legal_entity as e', 'e.id', 't.legalEntityId').orderBy([{ column: 't.taxClass' }, { column: 't.validFrom', order: 'desc' }])
    .select<TaxLine[]>('t.id', 't.taxClass', 't.treatment', 't.rateBp', 't.exemptionReason', 't.validFrom', 't.validTo', 'e.name as entityName');

export async function changeTax(trx: Trx, tax: { id: string; legalEntityId: string; taxClass: string; treatment: Treatment; rateBp: number; exemptionReason: string; validFrom: LocalDate; approvedBy: string }): Promise<void> {
  const same = () => trx('tax_rate').where({ legalEntityId: tax.legalEntityId, taxClass: tax.taxClass });
  await same().where({ validFrom: tax.validFrom }).delete();
  await endOn(same(), tax.validFrom);
  await trx('tax_rate').insert({ ...tax, validTo: await plannedAfter(same(), tax.validFrom) });
}
