import { say, type Explained, type MoneyWords } from '../explained';
import { sumOf } from '../money';
import type { LocalDate } from '../time';

/** Something a payer still owes: an instalment, or a late fee. `numberNo` breaks ties between equal due dates. */
export type OpenItem = { id: string; kind: 'instalment' | 'late_fee'; label: string; dueOn: LocalDate; numberNo: number; openMinor: number };
export type Allocation = { itemId: string; kind: OpenItem['kind']; amountMinor: number; sentence: string };
export type AllocationResult = { allocations: Allocation[]; creditMinor: number };

/** Fees last, then the oldest due date, then the lowest number. */
const byAllocationOrder = (a: OpenItem, b: OpenItem): number =>
  Number(a.kind === 'late_fee') - Number(b.kind === 'late_fee') || a.dueOn.localeCompare(b.dueOn) || a.numberNo - b.numberNo;

/**
 * Money received settles the oldest due item first and fees last; what is left over is the payer's credit, not income
 * (S20, B27, B28). `preferredIds` are the items of the document that the payer chose to pay: they come first.
 */
export function allocate(amountMinor: number, items: readonly OpenItem[], words: MoneyWords, preferredIds: ReadonlySet<string> = new Set()): Explained<AllocationResult> {
  const ordered = [...items].sort((a, b) => Number(preferredIds.has(b.id)) - Number(preferredIds.has(a.id)) || byAllocationOrder(a, b));
  let left = amountMinor;
  const allocations: Allocation[] = [];
  for (const item of ordered) {
    const taken = Math.min(left, Math.max(item.openMinor, 0));
    if (taken <= 0) continue;
    left -= taken;
    const rest = item.openMinor - taken;
    const sentence = `${say(taken, words)} for ${item.label}${rest > 0 ? `, ${say(rest, words)} still open` : ', settled'}`;
    allocations.push({ itemId: item.id, kind: item.kind, amountMinor: taken, sentence });
  }
  const open = sumOf(items.map((item) => item.openMinor)) - (amountMinor - left);
  const credit = left > 0 ? [`${say(left, words)} left over is kept as credit`] : [];
  return { value: { allocations, creditMinor: left }, steps: [...allocations.map(({ sentence }) => sentence), ...credit, `Still open: ${say(open, words)}`] };
}
