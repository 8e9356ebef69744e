import type { LocalDate } from '../time';

export type PriceRow = { productId: string; siteId: string | null; lengthMinutes: number | null; amountMinor: number; validFrom: LocalDate; validTo: LocalDate | null };
export type PriceWish = { productId: string; siteId: string | null; lengthMinutes: number | null; on: LocalDate };

const inForce = (row: { validFrom: LocalDate; validTo: LocalDate | null }, on: LocalDate) => row.validFrom <= on && (row.validTo === null || on < row.validTo);

/**
 * The price in force on a day. The most specific row wins: site and length, then length, then site, then neither.
 * Null when the list has none: a missing price is said, it is never zero.
 */
export function priceOf(rows: readonly PriceRow[], wish: PriceWish): number | null {
  const fitting = rows.filter((row) => row.productId === wish.productId && inForce(row, wish.on)
    && (row.siteId === null || row.siteId === wish.siteId) && (row.lengthMinutes === null || row.lengthMinutes === wish.lengthMinutes));
  const weight = (row: PriceRow) => (row.lengthMinutes === null ? 0 : 2) + (row.siteId === null ? 0 : 1);
  return [...fitting].sort((a, b) => weight(b) - weight(a))[0]?.amountMinor ?? null;
}
