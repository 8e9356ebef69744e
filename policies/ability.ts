import { AbilityBuilder, createAliasResolver, createMongoAbility, subject } from '@casl/ability';
import { AppError, notFound } from '@/lib/errors';
import { grantsOf } from './grants';
import type { Action, Actor, AppAbility, SubjectName } from './types';

export { ROLES } from './types';
export type { Action, Actor, Allow, AppAbility, Role, SubjectName } from './types';

// The library would let "manage" stand for every action there is, and whoever manages families could carry them out of the house.
const RESOLVED = { anyAction: 'every action', resolveAction: createAliasResolver({ manage: ['read', 'create', 'update', 'approve'] }, { anyAction: 'every action' }) };

/** Nothing is allowed until a grant says so, and no grant takes anything away. */
export function abilityFor(actor: Actor): AppAbility {
  const { can: allow, build } = new AbilityBuilder<AppAbility>(createMongoAbility);
  grantsOf(actor, allow);
  return build(RESOLVED);
}

export const may = (ability: AppAbility, action: Action, name: SubjectName, record: object = {}): boolean =>
  ability.can(action, subject(name, { ...record }));

/**
 * Stands in front of every operation, on the record itself. A record that this person may not even read
 * answers like one that does not exist; one that may be read but not changed says so.
 */
export function assertCan(ability: AppAbility, action: Action, name: SubjectName, record: object): void {
  if (may(ability, action, name, record)) return;
  if (!may(ability, 'read', name, record)) throw notFound(wordsFor(name));
  if (action === 'export') throw new AppError('forbidden', 'Only the owner takes lists out of the house.');
  throw new AppError('forbidden', `Your role does not let you do this with ${withArticle(wordsFor(name))}.`);
}

const withArticle = (words: string) => `${/^[aeiou]/.test(words) ? 'an' : 'a'} ${words}`;

/** "PayRun" → "pay run". */
export const wordsFor = (name: SubjectName): string => name.replace(/(?<=[a-z])[A-Z]/g, (letter) => ` ${letter}`).toLowerCase();
