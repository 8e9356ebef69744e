import { describe, expect, it } from 'vitest';
import { CONSEQUENCES } from './calendar/consequences';
import { HOUSE_RULES, houseRulesFrom } from './house-rules';

describe('house rules', () => {
  it('without a stored row every rule has the value of the house', () => {
    const rules = houseRulesFrom([]);
    expect(Object.keys(rules).sort()).toEqual(Object.keys(HOUSE_RULES).sort());
    expect(rules).toMatchObject({ 'cancel.days_before': 1, 'credit.cap_per_term': 2, 'tuition.discount_mode': 'one_after_other' });
  });
  it('each value of the house fits its own rule and each rule has words for a person', () => {
    for (const { schema, value, label } of Object.values(HOUSE_RULES)) {
      expect(schema.parse(value)).toEqual(value);
      expect(label).toMatch(/^[A-Z].{5,}[^.]$/);
    }
  });
  it('a stored row wins, and only for its own rule', () => {
    const rules = houseRulesFrom([{ key: 'credit.valid_days', valueJson: '90' }, { key: 'tuition.month_rule', valueJson: '"half_month"' }]);
    expect([rules['credit.valid_days'], rules['tuition.month_rule'], rules['hearing.wait_days']]).toEqual([90, 'half_month', 7]);
  });
  it('zero is a value, not a missing one', () => expect(houseRulesFrom([{ key: 'trial.fee_minor', valueJson: '0' }])['trial.fee_minor']).toBe(0));
  it.each([['credit.valid_days', '0'], ['credit.valid_days', '"sixty"'], ['tuition.month_rule', '"weekly"'], ['trial.fee_minor', '-1'], ['trial.fee_minor', '12.5'], ['cancel.days_before', 'null']])('a stored %s of %s is refused loudly', (key, valueJson) => {
    expect(() => houseRulesFrom([{ key, valueJson }])).toThrow();
  });
  it('a stored table that lacks a mark, or knows one more, is refused loudly', () => {
    const { no_show, ...lacking } = CONSEQUENCES;
    for (const table of [lacking, { ...CONSEQUENCES, asleep: no_show }, { ...CONSEQUENCES, no_show: { ...no_show, payBp: { employee: 10_001, contractor: 0 } } }]) {
      expect(() => houseRulesFrom([{ key: 'attendance.consequences', valueJson: JSON.stringify(table) }])).toThrow();
    }
    expect(houseRulesFrom([{ key: 'attendance.consequences', valueJson: JSON.stringify(CONSEQUENCES) }])['attendance.consequences']).toEqual(CONSEQUENCES);
  });
  it('a row of a rule that no longer exists changes nothing', () => expect(houseRulesFrom([{ key: 'old.rule', valueJson: '1' }])).toEqual(houseRulesFrom([])));
});
