import 'server-only';
import * as z from 'zod';
import { recordAudit } from '@/db/audit';
import { houseRuleHistory, houseRulesOn, setHouseRule, type HouseRuleRow } from '@/db/settings';
import { transaction } from '@/db/transaction';
import { AppError } from '@/lib/errors';
import { HOUSE_RULES, PLAIN_RULE_KEYS, type HouseRules } from '@/lib/house-rules';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { isLocalDate } from '@/lib/time';
import { assertCan } from '@/policies/ability';

export const changeRuleSchema = z.object({ key: z.enum(PLAIN_RULE_KEYS), value: z.union([z.number(), z.string().max(40)], 'Enter a value.'), validFrom: z.string().refine(isLocalDate, 'Enter a date.') });

export async function readHouseRules({ db, ability, today }: Context): Promise<{ rules: HouseRules; history: HouseRuleRow[] }> {
  assertCan(ability, 'read', 'Settings', {});
  return { rules: await houseRulesOn(db, today), history: await houseRuleHistory(db) };
}

/** A dated change of a rule. What happened before that day is judged by the rule of that day. */
export async function changeHouseRule({ key, value, validFrom }: z.output<typeof changeRuleSchema>, context: Context): Promise<void> {
  assertCan(context.ability, 'update', 'Settings', {});
  const rule = HOUSE_RULES[key];
  const parsed = rule.schema.safeParse(value);
  if (!parsed.success) throw new AppError('invalid', 'This value does not fit the rule.', { value: [parsed.error.issues[0]?.message ?? 'Choose another value.'] });
  if (validFrom < context.today) throw new AppError('invalid', 'A rule changes from today on or later, never backwards.', { validFrom: ['Choose today or a later day.'] });
  await transaction(context.db, async (trx) => {
    await setHouseRule(trx, { id: newId(), key, value: parsed.data, validFrom, approvedBy: context.actor.personId });
    await recordAudit(trx, context, { action: 'rule', tableName: 'setting_version', rowId: key, after: { value, validFrom }, sentence: `${rule.label}: ${value} from ${validFrom}.` });
  });
}
