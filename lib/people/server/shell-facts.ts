import 'server-only';
import { findPerson, fullName } from '@/db/people';
import { termOn } from '@/db/terms';
import { weekOfTerm } from '@/lib/calendar/term';
import type { SignedIn } from '@/lib/server/context';
import type { Role } from '@/policies/ability';

export type ShellFacts = { role: Role; schoolName: string; termLine: string | null; personName: string; roles: Role[] };

/** What stands around every screen: the school, the week of the term, who is signed in and in which hats. */
export async function shellFacts({ db, actor, school, today, roles }: SignedIn): Promise<ShellFacts> {
  const [person, term] = [await findPerson(db, actor.personId), await termOn(db, today)];
  const week = term && weekOfTerm(term, today);
  return {
    role: actor.role, schoolName: school.name, termLine: term && week ? `${term.name}, week ${week.week} of ${week.of}` : null,
    personName: person ? fullName(person) : '', roles: roles.map(({ role }) => role),
  };
}
