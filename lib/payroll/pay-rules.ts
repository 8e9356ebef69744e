import { CONSEQUENCES, type MarkedAttendance } from '../calendar/attendance';
import type { LocalDate } from '../time';

export type EngagementKind = 'employee' | 'contractor';

/** House rules on pay as dated data: a lesson of 6 October is judged by the rules of 6 October. */
export type PayRule = { engagementKind: EngagementKind | null; validFrom: LocalDate; validTo: LocalDate | null } & (
  | { kind: 'absence'; value: Partial<Record<MarkedAttendance, number>> }
  | { kind: 'substitute'; value: { ofAbsentRateBp: number } }
);

const inForce = (rule: PayRule, kind: EngagementKind, on: LocalDate) =>
  (rule.engagementKind === null || rule.engagementKind === kind) && rule.validFrom <= on && (rule.validTo === null || on < rule.validTo);

/** House rule HR8: the share of the rate that an attendance fact pays. The school's own dated row wins over the standard table. */
export function payShareBp(attendance: MarkedAttendance, kind: EngagementKind, on: LocalDate, rules: readonly PayRule[]): number {
  const own = rules.filter((rule) => rule.kind === 'absence' && inForce(rule, kind, on))
    .sort((a, b) => Number(b.engagementKind !== null) - Number(a.engagementKind !== null));
  for (const rule of own) {
    const share = rule.kind === 'absence' ? rule.value[attendance] : undefined;
    if (share !== undefined) return share;
  }
  return CONSEQUENCES[attendance].payBp[kind];
}

/** House rule HR7: a substitute gets at least this share of the absent teacher's rate; null when the school has no such rule. */
export function substituteShareBp(kind: EngagementKind, on: LocalDate, rules: readonly PayRule[]): number | null {
  const rule = rules.find((candidate) => candidate.kind === 'substitute' && inForce(candidate, kind, on));
  return rule?.kind === 'substitute' ? rule.value.ofAbsentRateBp : null;
}
