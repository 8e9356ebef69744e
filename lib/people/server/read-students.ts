import 'server-only';
import { liveCreditsOf } from '@/db/credits';
import { enrolmentsOfStudent, LIVE_ENROLMENTS } from '@/db/enrolments';
import { familyOfStudent } from '@/db/families';
import { findPerson, fullName } from '@/db/people';
import { contactsOfStudent } from '@/db/student-contacts';
import { lessonsOfStudents, listStudents, type StudentListRow } from '@/db/student-lists';
import type { Context } from '@/lib/server/context';
import { addDays, ageOn } from '@/lib/time';
import { may } from '@/policies/ability';

export const readStudents = ({ db, ability }: Context): Promise<StudentListRow[]> => listStudents(db, ability);

export type StudentScreen = NonNullable<Awaited<ReturnType<typeof readStudent>>>;

/** One student as this person may see them; null for a foreign and for an unknown one alike. */
export async function readStudent({ id }: { id: string }, { db, ability, today }: Context) {
  const person = await findPerson(db, id);
  if (!person || !may(ability, 'read', 'Student', { id })) return null;
  const enrolments = await enrolmentsOfStudent(db, id);
  return {
    id, name: fullName(person), age: person.bornOn ? ageOn(person.bornOn, today) : null, isStudent: person.isStudent,
    /** How far one hand reaches; for those who teach. */
    reach: may(ability, 'read', 'Reach', { studentId: id }) ? { semitones: person.reachSemitones, mayChange: may(ability, 'update', 'Reach', { studentId: id }) } : null,
    enrolments: enrolments.filter(({ state }) => (LIVE_ENROLMENTS as readonly string[]).includes(state)),
    family: may(ability, 'read', 'Family') ? ((await familyOfStudent(db, id)) ?? null) : null,
    // Those of the adults too: for who may read everybody's, not for who may read their own.
    contacts: may(ability, 'read', 'Contact') ? await contactsOfStudent(db, id) : null,
    credits: await liveCreditsOf(db, [id], today),
    lessons: await lessonsOfStudents(db, [id], { from: addDays(today, -28), until: addDays(today, 28) }),
  };
}
