import { formatMoney } from './format';

/** What a computing rule answers: the value, and the sentences that a person opens to see how it came about. */
export type Explained<T> = { value: T; steps: string[] };

/** How amounts are written in the sentences of one bill or pay run. */
export type MoneyWords = { currency: string; locale: string };

export const say = (amountMinor: number, { currency, locale }: MoneyWords): string => formatMoney({ amountMinor, currency }, locale);

/** "10 %" from 1000 basis points, "12.5 %" from 1250. */
export const sayPercent = (basisPoints: number): string => `${basisPoints / 100} %`;

/** "€" from EUR: what stands before the digits of a money field. */
export const currencySign = (currency: string): string =>
  new Intl.NumberFormat('en', { style: 'currency', currency, currencyDisplay: 'narrowSymbol' }).formatToParts(0).find(({ type }) => type === 'currency')?.value ?? currency;
