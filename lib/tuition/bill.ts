import { sayPercent, type MoneyWords } from '../explained';
import { sumOf } from '../money';
import type { LocalDate } from '../time';
import { discountLines, type Award, type DiscountMode, type DiscountRule, type DiscountStep, type GrossLine } from './discounts';
import { instalmentsOf, type Instalment, type InstalmentPlan } from './instalments';
import { splitCharges, type Share, type SplitRule } from './shares';
import { taxOf, taxPerLine, type TaxedLine, type TaxGroup, type Treatment } from './tax';

/** A line before discounts and tax. */
export type DraftLine = {
  chargeKind: string; productId: string | null; enrolmentId: string | null; studentId: string | null; text: string;
  quantity: number; unitMinor: number; grossMinor: number; taxClass: string; accountCode: string;
  serviceFrom: LocalDate | null; serviceTo: LocalDate | null; explain: string[];
  /** Only tuition counts for discounts and scholarships. */
  isDiscountable: boolean;
  seatIds: string[];
};
export type TaxRule = { taxClass: string; treatment: Treatment; rateBp: number; reason: string };

export type BillFacts = {
  lines: readonly DraftLine[];
  discountRules: readonly DiscountRule[]; awards: readonly Award[]; discountMode: DiscountMode;
  billedBefore?: readonly GrossLine[];
  taxRules: readonly TaxRule[]; taxMode: 'inclusive' | 'exclusive';
  splitRules: readonly SplitRule[]; defaultPayerId: string;
  plan: InstalmentPlan; words: MoneyWords;
};

export type BillLine = Omit<DraftLine, 'isDiscountable' | 'taxClass'> & {
  steps: DiscountStep[]; netMinor: number; treatment: Treatment; taxBp: number; taxMinor: number;
};
export type BillShare = Share & { instalments: Instalment[] };
export type Bill = { lines: BillLine[]; taxGroups: TaxGroup[]; netMinor: number; taxMinor: number; totalMinor: number; shares: BillShare[]; steps: string[] };

/** Without a rule of its own a class of goods is not guessed at. */
export class MissingTaxRule extends RangeError {
  constructor(readonly taxClass: string) {
    super(`no tax rule for ${taxClass}`);
  }
}

/**
 * One family's bill: lines, discounts in order, tax by rate group, shares of the payers, instalments. Every figure keeps
 * its sentences; the lines add up to the bill, the shares to the bill, the instalments to the share (job map 1.8, rule 2).
 */
export function buildBill(facts: BillFacts): Bill {
  const discounted = discountsOf(facts);
  const taxed = facts.lines.map((line, index): TaxedLine => {
    const rule = facts.taxRules.find(({ taxClass }) => taxClass === line.taxClass);
    if (!rule) throw new MissingTaxRule(line.taxClass);
    return { netMinor: discounted[index]?.netMinor ?? line.grossMinor, treatment: rule.treatment, rateBp: rule.rateBp, reason: rule.reason };
  });
  const totals = taxOf(taxed, facts.words, facts.taxMode);
  const taxParts = taxPerLine(taxed, totals.value, facts.taxMode);
  const lines = facts.lines.map((line, index) => finishLine(line, discounted[index]?.steps ?? [], { ...taxed[index]!, taxMinor: taxParts[index] ?? 0 }, facts));
  const charges = lines.map((line) => ({ kind: line.chargeKind, amountMinor: line.netMinor + line.taxMinor }));
  const shares = splitCharges(charges, facts.splitRules, facts.defaultPayerId, facts.words)
    .map((share) => ({ ...share, instalments: instalmentsOf(share.amountMinor, facts.plan, facts.words).value }));
  const { groups: taxGroups, netMinor, taxMinor, totalMinor } = totals.value;
  return { lines, taxGroups, netMinor, taxMinor, totalMinor, shares, steps: totals.steps };
}

function discountsOf({ lines, discountRules, awards, discountMode, billedBefore, words }: BillFacts): { netMinor: number; steps: DiscountStep[] }[] {
  const gross = lines.flatMap((line, index): GrossLine[] =>
    line.isDiscountable && line.studentId ? [{ key: String(index), studentId: line.studentId, grossMinor: line.grossMinor }] : []);
  const keyed = awards.map((award) => ({ ...award, lineKey: award.lineKey === null ? null : String(lines.findIndex(({ enrolmentId }) => enrolmentId === award.lineKey)) }));
  const results = new Map(discountLines(gross, discountRules, keyed, { mode: discountMode, words, billedBefore }).map((line) => [line.key, line]));
  return lines.map((line, index) => results.get(String(index)) ?? { netMinor: line.grossMinor, steps: [] });
}

function finishLine(draft: DraftLine, discounts: DiscountStep[], tax: TaxedLine & { taxMinor: number }, { taxMode }: BillFacts): BillLine {
  const { isDiscountable: _isDiscountable, taxClass: _taxClass, ...line } = draft;
  const isIncluded = taxMode === 'inclusive' && tax.taxMinor !== 0;
  const netMinor = isIncluded ? tax.netMinor - tax.taxMinor : tax.netMinor;
  const included: DiscountStep[] = isIncluded
    ? [{ label: 'Tax included in the price', sentence: `${sayPercent(tax.rateBp)} tax is included in the price`, discountRuleId: null, scholarshipAwardId: null, beforeMinor: tax.netMinor, changeMinor: -tax.taxMinor, afterMinor: netMinor }]
    : [];
  const steps = [...discounts, ...included];
  return {
    ...line, steps, netMinor, treatment: tax.treatment, taxBp: tax.treatment === 'taxed' ? tax.rateBp : 0, taxMinor: tax.taxMinor,
    explain: [...line.explain, ...steps.map(({ sentence }) => sentence), ...exemption(tax)],
  };
}

const exemption = ({ treatment, reason }: TaxedLine): string[] => (treatment === 'exempt' ? [`Exempt from tax: ${reason}`] : []);

/** Sums that a reader may check by hand. */
export const billAddsUp = (bill: Bill): boolean =>
  sumOf(bill.lines.map(({ netMinor, taxMinor }) => netMinor + taxMinor)) === bill.totalMinor
  && sumOf(bill.shares.map(({ amountMinor }) => amountMinor)) === bill.totalMinor
  && bill.shares.every((share) => sumOf(share.instalments.map(({ amountMinor }) => amountMinor)) === share.amountMinor);
