import type { Db } from '../../db/connection';
import type { School } from '../../db/school';
import type { Context } from '../../lib/server/context';
import { localDateOf } from '../../lib/time';
import { abilityFor, type Actor, type Role } from '../../policies/ability';

/** Tuesday 17 November 2026, 09:00 in Dublin. */
export const NOW = Date.UTC(2026, 10, 17, 9, 0) / 1000;

export const SCHOOL: School = {
  name: 'Lantern Street School', locale: 'en-IE', zone: 'Europe/Dublin', currency: 'EUR', weekStart: 1, publicEmail: null, publicPhone: null,
  chordStyle: 'words', safeguardingContact: null, isDemo: false,
};

type Over = Partial<Actor> & { now?: number; school?: Partial<School> };

export function contextOf(db: Db, role: Role, over: Over = {}): Context {
  const { now = NOW, school: schoolOver, ...actorOver } = over;
  const school = { ...SCHOOL, ...schoolOver };
  const actor: Actor = {
    userId: `user-${role}`, personId: role, role, isLead: false, studentIds: [], payerIds: [], familyIds: [], taughtStudentIds: [], coveredTodayIds: [], ...actorOver,
  };
  return { db, actor, ability: abilityFor(actor), now, today: localDateOf(now, school.zone), school };
}
