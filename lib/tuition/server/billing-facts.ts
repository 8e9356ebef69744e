import 'server-only';
import type { Db } from '@/db/connection';
import { awardsOn, discountRulesOn, type DiscountRow } from '@/db/discounts';
import { payersOfFamilies, splitRulesOn, type FamilySplit, type Payer } from '@/db/payers';
import { liveProducts, priceList, taxRatesOn, type Product, type TaxRateRow } from '@/db/prices';
import { datedConsequences, houseRulesOn } from '@/db/settings';
import { closuresBetween } from '@/db/terms';
import { billedTuition, enrolmentsIn, lastRunLines, onceOnlyCharges, seatsIn, type BilledEnrolment, type BilledSeat } from '@/db/tuition-facts';
import type { DatedConsequences } from '@/lib/calendar/consequences';
import type { Closure } from '@/lib/calendar/term';
import type { HouseRules } from '@/lib/house-rules';
import type { LocalDate } from '@/lib/time';
import type { Award } from '../discounts';
import type { InstalmentPlan } from '../instalments';
import type { PriceRow } from '../prices';
import type { ComparedLine } from '../run-difference';

export type BillingPeriod = { kind: 'term' | 'month'; from: LocalDate; to: LocalDate; label: string };
export type Manner = { locale: string; zone: string };

/** Everything that the bills of a period are worked out from, read once. */
export type BillingFacts = {
  period: BillingPeriod; plan: InstalmentPlan; manner: Manner; rules: HouseRules; consequences: DatedConsequences[];
  enrolments: BilledEnrolment[]; seats: Map<string, BilledSeat[]>; closures: Closure[];
  products: Product[]; prices: PriceRow[]; taxRates: TaxRateRow[];
  discounts: DiscountRow[]; awards: Award[]; splits: FamilySplit[]; payers: Map<string, Payer[]>;
  billed: Map<string, { studentId: string; enrolmentId: string; grossMinor: number }[]>;
  registered: Set<string>; trialsCredited: Set<string>; before: Map<string, ComparedLine[]>;
};

export async function readBillingFacts(db: Db, period: BillingPeriod, plan: InstalmentPlan, manner: Manner): Promise<BillingFacts> {
  const enrolments = await enrolmentsIn(db, period);
  const [billed, once] = [await billedTuition(db, period), await onceOnlyCharges(db)];
  return {
    period, plan, manner, rules: await houseRulesOn(db, period.from), consequences: await datedConsequences(db), enrolments,
    seats: groupBy(await seatsIn(db, period), ({ enrolmentId }) => enrolmentId), closures: await closuresBetween(db, period.from, period.to),
    products: await liveProducts(db), prices: await priceList(db), taxRates: await taxRatesOn(db, period.from),
    discounts: await discountRulesOn(db, period.from), awards: await awardsOn(db, period.from), splits: await splitRulesOn(db, period.from),
    payers: groupBy(await payersOfFamilies(db, [...new Set(enrolments.map(({ familyId }) => familyId))]), ({ familyId }) => familyId),
    billed: groupBy(billed, ({ familyId }) => familyId), ...once, before: await lastRunLines(db, period.kind, period.from),
  };
}

export function groupBy<T>(rows: readonly T[], keyOf: (row: T) => string): Map<string, T[]> {
  const groups = new Map<string, T[]>();
  for (const row of rows) {
    const known = groups.get(keyOf(row));
    if (known) known.push(row);
    else groups.set(keyOf(row), [row]);
  }
  return groups;
}
