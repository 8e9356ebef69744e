import { consequencesSchema, type DatedConsequences } from '@/lib/calendar/consequences';
import { houseRulesFrom, type HouseRuleKey, type HouseRules } from '@/lib/house-rules';
import type { LocalDate } from '@/lib/time';
import type { Db, Trx } from './connection';

type Row = { key: string; valueJson: string };

/** The house rules of a day. */
export async function houseRulesOn(db: Db, date: LocalDate): Promise<HouseRules> {
  const rows: Row[] = await db('setting_version').whereNull('siteId').where('validFrom', '<=', date)
    .andWhere((query) => query.whereNull('validTo').orWhere('validTo', '>', date)).select('key', 'valueJson');
  return houseRulesFrom(rows);
}

/** From this day on the rule has a new value, until the day for which another one is planned; the row before it ends the day it begins. */
export async function setHouseRule(trx: Trx, rule: { id: string; key: HouseRuleKey; value: unknown; validFrom: LocalDate; approvedBy: string | null; sourceText?: string }): Promise<void> {
  const { value, ...row } = rule;
  const versions = () => trx('setting_version').where({ key: rule.key }).whereNull('siteId');
  const [next]: { validFrom: LocalDate }[] = await versions().where('validFrom', '>', rule.validFrom).orderBy('validFrom').limit(1).select('validFrom');
  await versions().where('validFrom', '<', rule.validFrom).andWhere((query) => query.whereNull('validTo').orWhere('validTo', '>', rule.validFrom)).update({ validTo: rule.validFrom });
  await versions().where({ validFrom: rule.validFrom }).delete();
  await trx('setting_version').insert({ ...row, validTo: next?.validFrom ?? null, valueJson: JSON.stringify(value) });
}

export type HouseRuleRow = { key: string; value: number | string; validFrom: LocalDate; validTo: LocalDate | null; approvedByName: string | null };
export async function houseRuleHistory(db: Db): Promise<HouseRuleRow[]> {
  const rows: (Omit<HouseRuleRow, 'value'> & { valueJson: string })[] = await db('setting_version as s').leftJoin('person as p', 'p.id', 's.approvedBy').whereNull('s.siteId').whereNot('s.key', 'attendance.consequences').orderBy('s.validFrom', 'desc')
    .select('s.key', 's.valueJson', 's.validFrom', 's.validTo', db.raw("trim(p.given_name || ' ' || p.family_name) AS approved_by_name"));
  return rows.map(({ valueJson, ...row }) => ({ ...row, value: JSON.parse(valueJson) as number | string }));
}

export type ConsequenceVersion = DatedConsequences & { approvedByName: string | null };
/** Every consequence table the school has set, the earliest first; one that lacks a mark is refused loudly. */
export async function datedConsequences(db: Db): Promise<ConsequenceVersion[]> {
  const rows: { valueJson: string; validFrom: LocalDate; validTo: LocalDate | null; approvedByName: string | null }[] = await db('setting_version as s').leftJoin('person as p', 'p.id', 's.approvedBy')
    .whereNull('s.siteId').where('s.key', 'attendance.consequences').orderBy('s.validFrom')
    .select('s.valueJson', 's.validFrom', 's.validTo', db.raw("trim(p.given_name || ' ' || p.family_name) AS approved_by_name"));
  return rows.map(({ valueJson, ...row }) => ({ ...row, table: consequencesSchema.parse(JSON.parse(valueJson)) }));
}
