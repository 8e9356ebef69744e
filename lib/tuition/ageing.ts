import type { Explained } from '../explained';
import { sumOf } from '../money';
import { daysBetween, type LocalDate } from '../time';

export const AGE_BUCKETS = ['not_due', 'to_30', 'to_60', 'to_90', 'over_90'] as const;
export type AgeBucket = (typeof AGE_BUCKETS)[number];
export const AGE_WORDS: Record<AgeBucket, string> = { not_due: 'Not yet due', to_30: '1–30 days', to_60: '31–60 days', to_90: '61–90 days', over_90: 'Over 90 days' };

/** Days past due: 0 and fewer are not yet due, 30 and 31 fall apart, and so do 60 and 61, 90 and 91 (B26). */
export function bucketOf(daysPastDue: number): AgeBucket {
  if (daysPastDue <= 0) return 'not_due';
  if (daysPastDue <= 30) return 'to_30';
  if (daysPastDue <= 60) return 'to_60';
  return daysPastDue <= 90 ? 'to_90' : 'over_90';
}

export type AgeingRow = { dueOn: LocalDate; openMinor: number };
export type Ageing = { buckets: Record<AgeBucket, number>; grossMinor: number; creditMinor: number; netMinor: number };

/** What is owed, by how long it has been due, as at a day (S21). The rows are those open on that day, whatever was paid since. */
export function ageingOf(rows: readonly AgeingRow[], creditMinor: number, asAt: LocalDate): Explained<Ageing> {
  const buckets: Record<AgeBucket, number> = { not_due: 0, to_30: 0, to_60: 0, to_90: 0, over_90: 0 };
  for (const { dueOn, openMinor } of rows) buckets[bucketOf(daysBetween(dueOn, asAt))] += openMinor;
  const grossMinor = sumOf(Object.values(buckets));
  const steps = rows.map(({ dueOn }) => `Due ${dueOn}: ${Math.max(daysBetween(dueOn, asAt), 0)} days past due on ${asAt}`);
  return { value: { buckets, grossMinor, creditMinor, netMinor: grossMinor - creditMinor }, steps };
}
