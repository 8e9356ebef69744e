import type { HouseRuleKey } from '@/lib/house-rules';

/** Rules that are a choice of manners rather than a number. */
export const CHOICES: Partial<Record<HouseRuleKey, { value: string; label: string }[]>> = {
  'tuition.discount_mode': [{ value: 'one_after_other', label: 'one after the other' }, { value: 'best_only', label: 'the best one only' }],
  'tuition.month_rule': [{ value: 'by_lessons', label: 'by the lessons left' }, { value: 'by_days', label: 'by the days left' }, { value: 'half_month', label: 'half a month' }],
};

export function ruleWords(key: HouseRuleKey, value: number | string): string {
  const choice = CHOICES[key]?.find((candidate) => candidate.value === value);
  if (choice) return choice.label;
  return key.endsWith('_minor') ? (Number(value) / 100).toFixed(2) : String(value);
}
