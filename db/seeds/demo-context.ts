import type { Context } from '@/lib/server/context';
import { localDateOf, type EpochSeconds } from '@/lib/time';
import { abilityFor, type Actor } from '@/policies/ability';
import type { House } from './demo-types';

/** The owner at an earlier moment. */
export const ownerAt = ({ owner, zone }: House, now: EpochSeconds): Context => ({ ...owner, now, today: localDateOf(now, zone) });

/** A teacher at an earlier moment, with the students taught then. */
export function teacherAt(house: House, personId: string, taughtStudentIds: readonly string[], now: EpochSeconds): Context {
  const actor: Actor = { userId: `demo-${personId}`, personId, role: 'teacher', isLead: false, studentIds: [], payerIds: [], familyIds: [], taughtStudentIds, coveredTodayIds: [] };
  return { ...ownerAt(house, now), actor, ability: abilityFor(actor) };
}
