import * as z from 'zod';
import { CONSEQUENCES, consequencesSchema } from './calendar/consequences';

/**
 * The rules a school decides for itself, each a dated row in `setting_version` with who approved it. A lesson of
 * 6 October is judged by the rules of 6 October. What is not set takes the value here, a common practice of the
 * trade without a source; a legal number has no default and its feature stays off until it is set.
 */
export const HOUSE_RULES = {
  'trial.fee_minor': { label: 'Trial lesson fee', schema: z.number().int().min(0), value: 2500 },
  'trial.length_minutes': { label: 'Trial lesson length', schema: z.number().int().min(15).max(120), value: 30 },
  'trial.credit_days': { label: 'Days in which enrolling credits the trial fee', schema: z.number().int().min(0).max(365), value: 14 },
  'cancel.days_before': { label: 'Days before a lesson by which an absence must be told', schema: z.number().int().min(0).max(14), value: 1 },
  'credit.cap_per_term': { label: 'Make-up credits a family may earn per enrolment and term', schema: z.number().int().min(0).max(50), value: 2 },
  'credit.valid_days': { label: 'Days within which a make-up lesson must take place', schema: z.number().int().min(1).max(730), value: 60 },
  'attendance.consequences': { label: 'What each mark means for charge, credit, pay and package', schema: consequencesSchema, value: CONSEQUENCES },
  'tuition.discount_mode': { label: 'Discounts one after the other, or the best one only', schema: z.enum(['one_after_other', 'best_only']), value: 'one_after_other' },
  'tuition.month_rule': { label: 'How a month that is joined part-way is charged', schema: z.enum(['by_lessons', 'by_days', 'half_month']), value: 'by_lessons' },
  'tuition.due_days': { label: 'Days from the invoice to its due date', schema: z.number().int().min(0).max(120), value: 14 },
  'hearing.wait_days': { label: 'Days before a rung may be heard again', schema: z.number().int().min(0).max(60), value: 7 },
  'hearing.attempts_per_term': { label: 'Attempts at a rung in a term before the lead must agree', schema: z.number().int().min(1).max(20), value: 2 },
  'practice.reviews_per_day': { label: 'Rungs that come back for review on one day', schema: z.number().int().min(0).max(20), value: 4 },
  'practice.break_minutes': { label: 'Minutes of playing after which a rest is suggested', schema: z.number().int().min(5).max(90), value: 25 },
} as const;

export type HouseRuleKey = keyof typeof HOUSE_RULES;
/** A rule that is one number or one choice; the consequence table is a table and has a screen of its own. */
export type PlainRuleKey = Exclude<HouseRuleKey, 'attendance.consequences'>;
export const PLAIN_RULE_KEYS = Object.keys(HOUSE_RULES).filter((key): key is PlainRuleKey => key !== 'attendance.consequences');
export type HouseRules = { [Key in HouseRuleKey]: z.output<(typeof HOUSE_RULES)[Key]['schema']> };

type StoredRule = { key: string; valueJson: string };

/** The rules in force, from the rows valid on the day; a stored value that no longer fits its shape is refused loudly. */
export function houseRulesFrom(rows: readonly StoredRule[]): HouseRules {
  const stored = new Map(rows.map(({ key, valueJson }) => [key, JSON.parse(valueJson) as unknown]));
  const entries = Object.entries(HOUSE_RULES).map(([key, rule]) => [key, stored.has(key) ? rule.schema.parse(stored.get(key)) : rule.value]);
  return Object.fromEntries(entries) as HouseRules;
}
