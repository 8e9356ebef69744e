import { say, sayPercent, type MoneyWords } from '../explained';
import { BASIS_POINTS, sumOf } from '../money';
import type { PayLine } from './pay-lines';

type TotalledLine = Pick<PayLine, 'kind' | 'minutes' | 'amountMinor' | 'problem'>;
export type PayTotals = {
  lessons: number; minutes: number; teachingMinor: number; otherMinor: number; correctionMinor: number;
  /** Wages before tax; reimbursements stand apart. */
  grossMinor: number; reimbursementMinor: number; problems: number;
};

const TEACHING = new Set(['lesson', 'group', 'substitute', 'absence']);

/** The row of one teacher in a pay run, or of all of them. */
export function payTotalsOf(lines: readonly TotalledLine[]): PayTotals {
  const amountOf = (fits: (line: TotalledLine) => boolean) => sumOf(lines.filter(fits).map(({ amountMinor }) => amountMinor));
  const teachingMinor = amountOf(({ kind }) => TEACHING.has(kind));
  const otherMinor = amountOf(({ kind }) => kind === 'other_time');
  const correctionMinor = amountOf(({ kind }) => kind === 'correction');
  return {
    lessons: lines.filter(({ kind, problem, amountMinor }) => TEACHING.has(kind) && problem === '' && amountMinor > 0).length,
    minutes: sumOf(lines.map(({ minutes }) => minutes)),
    teachingMinor, otherMinor, correctionMinor, grossMinor: teachingMinor + otherMinor + correctionMinor,
    reimbursementMinor: amountOf(({ kind }) => kind === 'reimbursement'),
    problems: lines.filter(({ problem }) => problem !== '').length,
  };
}

export type SummaryRow = { sentence: string; count: number; amountMinor: number };
type SummedLine = Pick<PayLine, 'kind' | 'problem' | 'minutes' | 'rateMinor' | 'shareBp' | 'amountMinor'> & { lengthMinutes: number | null };

/** "4 × 45 min at €30.00 = €120.00": equal lessons of a pay statement on one row. */
export function summaryOf(lines: readonly SummedLine[], words: MoneyWords): SummaryRow[] {
  const groups = new Map<string, SummedLine[]>();
  for (const line of lines) {
    if (line.problem !== '' || (line.kind !== 'lesson' && line.kind !== 'group')) continue;
    const key = [line.kind, line.lengthMinutes, line.rateMinor, line.shareBp].join(':');
    groups.set(key, [...(groups.get(key) ?? []), line]);
  }
  return [...groups.values()].flatMap((equal) => {
    const [first] = equal;
    if (!first) return [];
    const amountMinor = sumOf(equal.map((line) => line.amountMinor));
    const share = first.shareBp === BASIS_POINTS ? '' : ` × ${sayPercent(first.shareBp)}`;
    const what = `${first.lengthMinutes ?? first.minutes} min${first.kind === 'group' ? ' group' : ''}`;
    return [{ sentence: `${equal.length} × ${what} at ${say(first.rateMinor, words)}${share} = ${say(amountMinor, words)}`, count: equal.length, amountMinor }];
  });
}
