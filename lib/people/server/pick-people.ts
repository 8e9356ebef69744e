import 'server-only';
import { findStudents, findTeachersByName } from '@/db/find';
import type { Context } from '@/lib/server/context';
import { may } from '@/policies/ability';
import type { PickedKind, PickedPerson } from '../found';

const SHORTEST_TEXT = 2;

/** People to choose from in a form, as far as the person who fills it in may see them. */
export async function pickPeople({ kind, text }: { kind: PickedKind; text: string }, { db, ability }: Context): Promise<PickedPerson[]> {
  const wanted = text.trim();
  if (wanted.length < SHORTEST_TEXT) return [];
  if (kind === 'student') return (await findStudents(db, ability, wanted)).map((person) => ({ ...person, detail: 'student' }));
  return may(ability, 'read', 'Room') ? (await findTeachersByName(db, wanted)).map((person) => ({ ...person, detail: 'teacher' })) : [];
}
