import { say, sayPercent, type MoneyWords } from '../explained';
import { percentOf, sumOf } from '../money';

/** A tuition line before its discounts. */
export type GrossLine = { key: string; studentId: string; grossMinor: number };

/** second_child: every student but the one with the highest gross. multi_lesson: second and later lessons of one student, by gross. */
export type DiscountRule = { id: string; label: string; qualifies: 'second_child' | 'multi_lesson' | 'family'; rateBp: number; orderNo: number };
export type Award = { id: string; label: string; studentId: string; lineKey: string | null; rateBp: number };

/** One after the other, rounding each; or only the best automatic discount of each line, then the scholarship. */
export type DiscountMode = 'one_after_other' | 'best_only';

export type DiscountStep = {
  label: string; sentence: string; discountRuleId: string | null; scholarshipAwardId: string | null;
  beforeMinor: number; changeMinor: number; afterMinor: number;
};
export type DiscountedLine = GrossLine & { netMinor: number; steps: DiscountStep[] };

export type DiscountManner = {
  mode: DiscountMode; words: MoneyWords;
  /** Lines of the same family and period that were billed before: they count for the ranking and keep their own discounts. */
  billedBefore?: readonly GrossLine[];
};

/** House rule HR4 (S14): the automatic discounts in their order, then the scholarship, each on what the one before left, each rounded. */
export function discountLines(lines: readonly GrossLine[], rules: readonly DiscountRule[], awards: readonly Award[], how: DiscountManner): DiscountedLine[] {
  const ranked = [...(how.billedBefore ?? []), ...lines];
  const inOrder = [...rules].sort((a, b) => a.orderNo - b.orderNo);
  return lines.map((line) => {
    const fitting = inOrder.filter((rule) => qualifies(rule, line, ranked));
    const automatic = how.mode === 'best_only' ? bestOf(fitting) : fitting;
    const award = awards.filter(({ studentId, lineKey }) => studentId === line.studentId && (lineKey === null || lineKey === line.key));
    const steps: DiscountStep[] = [];
    const take = (label: string, rateBp: number, ids: Pick<DiscountStep, 'discountRuleId' | 'scholarshipAwardId'>) => {
      const beforeMinor = steps.at(-1)?.afterMinor ?? line.grossMinor;
      const changeMinor = -percentOf(beforeMinor, rateBp) || 0;
      const afterMinor = beforeMinor + changeMinor;
      const sentence = `${label}, ${sayPercent(rateBp)}: ${say(beforeMinor, how.words)} − ${say(-changeMinor || 0, how.words)} = ${say(afterMinor, how.words)}`;
      steps.push({ label, sentence, ...ids, beforeMinor, changeMinor, afterMinor });
    };
    for (const rule of automatic) take(rule.label, rule.rateBp, { discountRuleId: rule.id, scholarshipAwardId: null });
    for (const { id, label, rateBp } of award) take(label, rateBp, { discountRuleId: null, scholarshipAwardId: id });
    return { ...line, netMinor: steps.at(-1)?.afterMinor ?? line.grossMinor, steps };
  });
}

const bestOf = (rules: DiscountRule[]): DiscountRule[] =>
  rules.length === 0 ? [] : [rules.reduce((best, rule) => (rule.rateBp > best.rateBp ? rule : best))];

function qualifies({ qualifies: kind }: DiscountRule, line: GrossLine, lines: readonly GrossLine[]): boolean {
  switch (kind) {
    case 'family': return true;
    case 'second_child': return line.studentId !== highestStudent(lines);
    case 'multi_lesson': return largestLine(lines.filter(({ studentId }) => studentId === line.studentId)) !== line.key;
  }
}

/** Ties go to the earlier in the list, here and below. */
function highestStudent(lines: readonly GrossLine[]): string | undefined {
  const grossOf = (student: string) => sumOf(lines.filter(({ studentId }) => studentId === student).map(({ grossMinor }) => grossMinor));
  const students = [...new Set(lines.map(({ studentId }) => studentId))];
  return students.reduce<string | undefined>((best, student) => (best === undefined || grossOf(student) > grossOf(best) ? student : best), undefined);
}

const largestLine = (lines: readonly GrossLine[]): string | undefined =>
  lines.reduce<GrossLine | undefined>((best, line) => (best === undefined || line.grossMinor > best.grossMinor ? line : best), undefined)?.key;
