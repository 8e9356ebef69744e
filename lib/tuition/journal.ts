import { sumOf } from '../money';

/** Accounts of the school's books; `income…` codes come from the products. */
const ACCOUNTS = { receivable: 'receivable', deferredTuition: 'deferred_tuition', tax: 'tax_owed', bank: 'bank', cash: 'cash', customerCredit: 'customer_credit', earnedTuition: 'tuition_income' } as const;

export type JournalLine = { accountCode: string; debitMinor: number; creditMinor: number };

/** A positive amount is a debit, a negative one a credit; nothing is written for zero. */
const line = (accountCode: string, amountMinor: number): JournalLine[] =>
  amountMinor === 0 ? [] : [{ accountCode, debitMinor: Math.max(amountMinor, 0), creditMinor: Math.max(-amountMinor, 0) }];

type Issued = { totalMinor: number; taxMinor: number; lines: readonly { chargeKind: string; accountCode: string; netMinor: number }[] };

/** Tuition billed ahead is a debt of the school until the lesson is given; other goods are income at once (B29). */
export function journalOfInvoice({ totalMinor, taxMinor, lines }: Issued): JournalLine[] {
  const accounts = lines.map((charge) => ({ code: charge.chargeKind === 'tuition' ? ACCOUNTS.deferredTuition : charge.accountCode, netMinor: charge.netMinor }));
  const credits = [...new Set(accounts.map(({ code }) => code))].flatMap((code) =>
    line(code, -sumOf(accounts.filter((account) => account.code === code).map(({ netMinor }) => netMinor))));
  return [...line(ACCOUNTS.receivable, totalMinor), ...credits, ...line(ACCOUNTS.tax, -taxMinor)];
}

/** Money in: what settles debts lowers the receivable, the rest is the customer's credit, not income (B28). */
export const journalOfPayment = (payment: { amountMinor: number; allocatedMinor: number; isCash: boolean }): JournalLine[] => [
  ...line(payment.isCash ? ACCOUNTS.cash : ACCOUNTS.bank, payment.amountMinor),
  ...line(ACCOUNTS.receivable, -payment.allocatedMinor),
  ...line(ACCOUNTS.customerCredit, -(payment.amountMinor - payment.allocatedMinor)),
];

export const journalOfCreditNote = (credit: { netMinor: number; taxMinor: number }): JournalLine[] => [
  ...line(ACCOUNTS.deferredTuition, credit.netMinor), ...line(ACCOUNTS.tax, credit.taxMinor), ...line(ACCOUNTS.receivable, -(credit.netMinor + credit.taxMinor)),
];

/** Lessons given turn what was billed ahead into income. */
export const journalOfEarning = (amountMinor: number): JournalLine[] => [...line(ACCOUNTS.deferredTuition, amountMinor), ...line(ACCOUNTS.earnedTuition, -amountMinor)];

/** Credit paid back (B30). */
export const journalOfRefund = (amountMinor: number): JournalLine[] => [...line(ACCOUNTS.customerCredit, amountMinor), ...line(ACCOUNTS.bank, -amountMinor)];

export const balanceOf = (lines: readonly JournalLine[]): number => sumOf(lines.map(({ debitMinor, creditMinor }) => debitMinor - creditMinor));
