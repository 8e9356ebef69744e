import type { CardAnswer } from './card-processor-store';

export type TypedCard = { number: string; expiry: string; code: string };
export type CheckedCard = { ok: true; brand: string; last4: string; answer: CardAnswer } | { ok: false; message: string };

/** The numbers to try, as the page shows them. */
export const TEST_CARDS = [
  { number: '4242 4242 4242 4242', says: 'is accepted' },
  { number: '4000 0000 0000 0002', says: 'is declined' },
  { number: '4000 0027 6000 3184', says: 'asks the bank first' },
] as const;

const ANSWERS: Record<string, CardAnswer> = { '4000000000000002': 'declined', '4000002760003184': 'needs_authentication' };
const BRANDS: [RegExp, string][] = [[/^4/, 'visa'], [/^5[1-5]|^2[2-7]/, 'mastercard'], [/^3[47]/, 'amex']];

/** The check digit of ISO/IEC 7812-1, annex B. */
function hasCheckDigit(number: string): boolean {
  const sum = [...number].reverse().reduce((total, digit, index) => {
    const value = Number(digit) * (index % 2 === 1 ? 2 : 1);
    return total + (value > 9 ? value - 9 : value);
  }, 0);
  return number.length >= 12 && sum % 10 === 0;
}

/** What is wrong with an expiry as typed, or nothing. */
function expiryFault(expiry: string, now: Date): string | null {
  const [, month, year] = /^\s*(0?[1-9]|1[0-2])\s*\/\s*(\d{2})\s*$/.exec(expiry) ?? [];
  if (!month || !year) return 'Write the expiry as month and year, like 04/30.';
  const lastMonth = (2000 + Number(year)) * 12 + Number(month);
  return lastMonth < now.getUTCFullYear() * 12 + now.getUTCMonth() + 1 ? 'This card has expired.' : null;
}

/** What is typed on the hosted page. The number itself is forgotten as soon as this has answered. */
export function checkCard(typed: TypedCard, now: Date): CheckedCard {
  const number = typed.number.replace(/[\s-]/g, '');
  if (!/^\d+$/.test(number) || !hasCheckDigit(number)) return { ok: false, message: 'This card number is not right. Check it digit by digit.' };
  const fault = expiryFault(typed.expiry, now);
  if (fault) return { ok: false, message: fault };
  if (!/^\d{3,4}$/.test(typed.code.trim())) return { ok: false, message: 'The security code has three or four digits.' };
  const brand = BRANDS.find(([pattern]) => pattern.test(number))?.[1] ?? 'card';
  return { ok: true, brand, last4: number.slice(-4), answer: ANSWERS[number] ?? 'accepted' };
}
