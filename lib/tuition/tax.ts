import { say, sayPercent, type Explained, type MoneyWords } from '../explained';
import { BASIS_POINTS, ratioOf, sumOf } from '../money';

export type Treatment = 'taxed' | 'zero' | 'exempt';
export type TaxedLine = { netMinor: number; treatment: Treatment; rateBp: number; reason: string };
export type TaxGroup = { treatment: Treatment; rateBp: number; netMinor: number; taxMinor: number; reason: string };
export type TaxTotals = { groups: TaxGroup[]; netMinor: number; taxMinor: number; totalMinor: number };

/** Whether prices are before tax, or contain it; then the tax is taken out of the group's sum. */
export type TaxMode = 'exclusive' | 'inclusive';
const baseBp = (rateBp: number, mode: TaxMode) => (mode === 'exclusive' ? BASIS_POINTS : BASIS_POINTS + rateBp);

const groupKey = ({ treatment, rateBp }: Pick<TaxedLine, 'treatment' | 'rateBp'>) => `${treatment}:${rateBp}`;

/**
 * Tax is rounded once per rate group on the group's sum, never per line and added up (EN 16931: BR-CO-17;
 * the totals are sums: BR-CO-10, -13, -14, -15). An exempt line must say why (BR-E-10).
 */
export function taxOf(lines: readonly TaxedLine[], words: MoneyWords, mode: TaxMode = 'exclusive'): Explained<TaxTotals> {
  const groups: TaxGroup[] = [];
  for (const line of lines) {
    if (line.treatment === 'exempt' && line.reason.trim() === '') throw new RangeError('an exempt line needs its reason');
    const group = groups.find((candidate) => groupKey(candidate) === groupKey(line));
    if (group) group.netMinor += line.netMinor;
    else groups.push({ treatment: line.treatment, rateBp: line.rateBp, netMinor: line.netMinor, taxMinor: 0, reason: line.reason });
  }
  for (const group of groups.filter(({ treatment }) => treatment === 'taxed')) {
    group.taxMinor = ratioOf(group.netMinor, group.rateBp, baseBp(group.rateBp, mode));
    if (mode === 'inclusive') group.netMinor -= group.taxMinor;
  }
  const netMinor = sumOf(groups.map((group) => group.netMinor));
  const taxMinor = sumOf(groups.map((group) => group.taxMinor));
  return { value: { groups, netMinor, taxMinor, totalMinor: netMinor + taxMinor }, steps: groups.map((group) => groupSentence(group, words)) };
}

function groupSentence({ treatment, rateBp, netMinor, taxMinor, reason }: TaxGroup, words: MoneyWords): string {
  if (treatment === 'exempt') return `${say(netMinor, words)} exempt from tax: ${reason}`;
  if (treatment === 'zero') return `${say(netMinor, words)} taxed at 0 %`;
  return `${sayPercent(rateBp)} of ${say(netMinor, words)} = ${say(taxMinor, words)} tax`;
}

/** Each line's part of its group's tax, so that lines, kinds of charge and credits add up to it. The cents left over go to the largest fractions. */
export function taxPerLine(lines: readonly TaxedLine[], { groups }: TaxTotals, mode: TaxMode = 'exclusive'): number[] {
  const parts = lines.map(() => 0);
  for (const group of groups.filter(({ treatment }) => treatment === 'taxed')) {
    const members = lines.flatMap((line, index) => (groupKey(line) === groupKey(group) ? [{ index, netMinor: line.netMinor }] : []));
    const base = baseBp(group.rateBp, mode);
    const exact = members.map(({ index, netMinor }) => {
      const floor = Math.floor((netMinor * group.rateBp) / base);
      return { index, floor, rest: netMinor * group.rateBp - floor * base };
    });
    let left = group.taxMinor - sumOf(exact.map(({ floor }) => floor));
    for (const { index, floor } of exact) parts[index] = floor;
    for (const { index } of [...exact].sort((a, b) => b.rest - a.rest || a.index - b.index)) {
      if (left <= 0) break;
      parts[index] = (parts[index] ?? 0) + 1;
      left -= 1;
    }
  }
  return parts;
}

/** Quantity at a price that may have four decimals and may be per a base quantity; the line is rounded once to the minor unit (BR-DEC, B05, B06). */
export const lineNet = (line: { quantity: number; priceTenThousandths: number; baseQuantity?: number }): number =>
  ratioOf(line.priceTenThousandths, line.quantity, 100 * (line.baseQuantity ?? 1));
