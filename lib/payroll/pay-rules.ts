import type { MarkedAttendance } from '../calendar/attendance';
import { consequencesOn, type DatedConsequences } from '../calendar/consequences';
import type { LocalDate } from '../time';

export type EngagementKind = 'employee' | 'contractor';

/** A house rule on pay as dated data: a lesson of 6 October is judged by the rules of 6 October. */
export type PayRule = { kind: 'substitute'; value: { ofAbsentRateBp: number }; engagementKind: EngagementKind | null; validFrom: LocalDate; validTo: LocalDate | null };

const inForce = (rule: PayRule, kind: EngagementKind, on: LocalDate) =>
  (rule.engagementKind === null || rule.engagementKind === kind) && rule.validFrom <= on && (rule.validTo === null || on < rule.validTo);

/** House rule HR8: the share of the rate that an attendance fact pays, by the consequence table of the lesson's day. */
export const payShareBp = (attendance: MarkedAttendance, kind: EngagementKind, on: LocalDate, dated: readonly DatedConsequences[]): number =>
  consequencesOn(dated, on)[attendance].payBp[kind];

/** House rule HR7: a substitute gets at least this share of the absent teacher's rate; null when the school has no such rule. */
export function substituteShareBp(kind: EngagementKind, on: LocalDate, rules: readonly PayRule[]): number | null {
  return rules.find((rule) => inForce(rule, kind, on))?.value.ofAbsentRateBp ?? null;
}
