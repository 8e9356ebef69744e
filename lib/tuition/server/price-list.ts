import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import { allLegalEntities } from '@/db/legal-entities';
import { changePrice, changeTax, priceHistory, taxHistory, type PriceLine, type TaxLine } from '@/db/price-changes';
import { liveProducts, type Product } from '@/db/prices';
import { transaction } from '@/db/transaction';
import { AppError, notFound } from '@/lib/errors';
import { formatDate, formatMoney } from '@/lib/format';
import { parseMoney } from '@/lib/money';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { assertCan } from '@/policies/ability';
import type { changePriceSchema, changeTaxSchema } from '../price-schema';

export type PriceList = { products: Product[]; prices: PriceLine[]; taxes: TaxLine[]; taxClasses: string[] };

export async function readPriceList({ db, ability }: Context): Promise<PriceList> {
  assertCan(ability, 'read', 'Price', {});
  const products = await liveProducts(db);
  return { products, prices: await priceHistory(db), taxes: await taxHistory(db), taxClasses: [...new Set(products.map(({ taxClass }) => taxClass))] };
}

/** A price holds from a day on; families billed before keep what they were billed. Nobody but the owner sets it. */
export async function setPrice(input: z.output<typeof changePriceSchema>, context: Context): Promise<void> {
  const { db, school, actor } = context;
  assertCan(context.ability, 'update', 'Price', {});
  const amountMinor = parseMoney(input.amount, school.currency);
  if (amountMinor === null || amountMinor < 0) throw new AppError('invalid', 'The amount was not understood.', { amount: ['Write it like 42 or 42.50.'] });
  const product = (await liveProducts(db)).find(({ id }) => id === input.productId);
  if (!product) throw notFound('product');
  await transaction(db, async (trx) => {
    await changePrice(trx, { id: newId(), productId: product.id, lengthMinutes: input.lengthMinutes, amountMinor, validFrom: input.validFrom, approvedBy: actor.personId });
    const what = `${product.label}${input.lengthMinutes ? ` ${input.lengthMinutes} min` : ''}`;
    await recordAudit(trx, context, { action: 'price', tableName: 'price', rowId: product.id, after: input, sentence: `${what}: ${formatMoney({ amountMinor, currency: school.currency }, school.locale)} from ${formatDate(input.validFrom, school.locale, 'full')}.` });
  });
}

/** How a class of charges is taxed from a day on, at every legal entity of the school's own country. The product never guesses it. */
export async function setTax(input: z.output<typeof changeTaxSchema>, context: Context): Promise<void> {
  const { db, actor } = context;
  assertCan(context.ability, 'update', 'Settings', {});
  const rateBp = input.treatment === 'taxed' ? Math.round(input.ratePercent * 100) : 0;
  await transaction(db, async (trx) => {
    for (const { id: legalEntityId } of await allLegalEntities(trx)) {
      await changeTax(trx, { id: newId(), legalEntityId, taxClass: input.taxClass, treatment: input.treatment, rateBp, exemptionReason: input.treatment === 'exempt' ? input.reason : '', validFrom: input.validFrom, approvedBy: actor.personId });
    }
    await recordAudit(trx, context, { action: 'tax', tableName: 'tax_rate', rowId: input.taxClass, after: input, sentence: `Set how ${input.taxClass} is taxed from ${input.validFrom}.` });
  });
}
