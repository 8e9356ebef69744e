import 'server-only';
import { findPeople, fullName } from '@/db/people';
import type { Context } from '@/lib/server/context';

/** The students whose ladder a family's reader may open: themselves, or the children whose progress they see. */
export async function climbersOf({ db, actor }: Context): Promise<{ id: string; name: string }[]> {
  const people = await findPeople(db, actor.studentIds);
  return people.filter(({ isStudent, state }) => isStudent && state === 'live').map((person) => ({ id: person.id, name: fullName(person) }))
    .sort((a, b) => a.name.localeCompare(b.name));
}
