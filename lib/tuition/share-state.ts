import type { LocalDate } from '../time';

/** What a payer's share of an invoice has come to. Worked out from allocations, never stored. */
export type ShareState = 'paid' | 'credited' | 'part_paid' | 'open' | 'overdue' | 'nothing_to_pay';

export const SHARE_WORDS: Record<ShareState, string> = {
  paid: 'paid', credited: 'credited', part_paid: 'part paid', open: 'to pay', overdue: 'overdue', nothing_to_pay: 'nothing to pay',
};
export const SHARE_TONES: Record<ShareState, 'ok' | 'wait' | 'bad' | 'neutral'> = {
  paid: 'ok', credited: 'ok', part_paid: 'wait', open: 'wait', overdue: 'bad', nothing_to_pay: 'neutral',
};

export type ShareFacts = { amountMinor: number; paidMinor: number; creditedMinor: number; nextDueOn: LocalDate | null };

/** An instalment is overdue from the day after it was due. */
export function shareStateOf({ amountMinor, paidMinor, creditedMinor, nextDueOn }: ShareFacts, today: LocalDate): ShareState {
  if (amountMinor === 0) return 'nothing_to_pay';
  if (amountMinor - paidMinor - creditedMinor <= 0) return paidMinor === 0 ? 'credited' : 'paid';
  if (nextDueOn !== null && nextDueOn < today) return 'overdue';
  return paidMinor + creditedMinor > 0 ? 'part_paid' : 'open';
}
