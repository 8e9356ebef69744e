import { rulesToCondition } from '@casl/ability/extra';
import type { Knex } from 'knex';
import type { Action, AppAbility, SubjectName } from './types';

type Where = (query: Knex.QueryBuilder) => void;
/** Where a condition's field is found: by default the column of the same name under the given alias. */
export type Columns = Record<string, string>;

/**
 * The same grants that answer "may I?" for one record, as a WHERE clause over a table. Grants only: nothing
 * here negates, so SQL's third truth value cannot let a row through.
 */
export function allowedRows(ability: AppAbility, action: Action, name: SubjectName, table: string | { alias: string; columns: Columns }): Where {
  const { alias, columns } = typeof table === 'string' ? { alias: table, columns: {} as Columns } : table;
  const where = rulesToCondition<AppAbility, Where, Where>(
    ability.rulesFor(action, name),
    (rule) => {
      if (rule.inverted) throw new Error('policies only grant; see policies/grants.ts');
      return matching(rule.conditions ?? {}, (field) => columns[field] ?? `${alias}.${field}`);
    },
    { and: every, or: some, empty: () => (query) => void query.whereRaw('1 = 1') },
  );
  return where ?? ((query) => void query.whereRaw('1 = 0'));
}

const every = (parts: Where[]): Where => (query) => {
  for (const part of parts) query.andWhere((inner) => part(inner));
};

const some = (parts: Where[]): Where => (query) => {
  query.where((group) => {
    for (const part of parts) group.orWhere((inner) => part(inner));
  });
};

function matching(conditions: Record<string, unknown>, columnOf: (field: string) => string): Where {
  return (query) => {
    query.whereRaw('1 = 1');
    for (const [field, wanted] of Object.entries(conditions)) {
      const column = columnOf(field);
      if (typeof wanted === 'string' || typeof wanted === 'number') query.where(column, wanted);
      else if (isOneOf(wanted)) query.whereIn(column, wanted.$in);
      else throw new Error(`no SQL for the condition on ${field}`);
    }
  };
}

const isOneOf = (wanted: unknown): wanted is { $in: string[] } =>
  typeof wanted === 'object' && wanted !== null && '$in' in wanted && Array.isArray(wanted.$in);
