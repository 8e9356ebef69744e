import type { PriceRow } from '@/lib/tuition/prices';
import type { Treatment } from '@/lib/tuition/tax';
import type { LocalDate } from '@/lib/time';
import type { Db, Trx } from './connection';

export type ProductKind = 'tuition' | 'registration' | 'trial' | 'book' | 'recital' | 'rental' | 'assessment' | 'fee' | 'package' | 'workshop';
export type Product = { id: string; code: string; label: string; kind: ProductKind; lessonTypeId: string | null; taxClass: string; accountCode: string };

export async function insertProduct(trx: Trx, product: Product): Promise<void> {
  await trx('product').insert(product);
}
export const liveProducts = (db: Db): Promise<Product[]> =>
  db<Product & { state: string }>('product').where({ state: 'live' }).orderBy('code').select('id', 'code', 'label', 'kind', 'lessonTypeId', 'taxClass', 'accountCode');

export async function insertPrice(trx: Trx, price: PriceRow & { id: string; approvedBy?: string | null }): Promise<void> {
  await trx('price').insert(price);
}
/** The whole price list, past and planned: the rule picks the row of the day. */
export const priceList = (db: Db): Promise<PriceRow[]> => db<PriceRow>('price').select('productId', 'siteId', 'lengthMinutes', 'amountMinor', 'validFrom', 'validTo');

export type TaxRateRow = { legalEntityId: string; taxClass: string; treatment: Treatment; rateBp: number; exemptionReason: string };
export async function insertTaxRate(trx: Trx, rate: TaxRateRow & { id: string; validFrom: LocalDate; validTo?: LocalDate | null; approvedBy?: string | null }): Promise<void> {
  await trx('tax_rate').insert(rate);
}
export const taxRatesOn = (db: Db, date: LocalDate): Promise<TaxRateRow[]> =>
  db<TaxRateRow & { validFrom: LocalDate; validTo: LocalDate | null }>('tax_rate').where('validFrom', '<=', date)
    .andWhere((query) => query.whereNull('validTo').orWhere('validTo', '>', date)).select('legalEntityId', 'taxClass', 'treatment', 'rateBp', 'exemptionReason');
