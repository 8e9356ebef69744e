import 'server-only';
import { findEnquiry, trialsOfEnquiry } from '@/db/enquiries';
import { levelOfStudent } from '@/db/enrolments';
import { familyOfStudent } from '@/db/families';
import { findOccurrence, type Occurrence } from '@/db/occurrences';
import { findPerson, fullName, guardiansOf } from '@/db/people';
import type { Context } from '@/lib/server/context';
import { addDays, weekdayOf, type LocalDate } from '@/lib/time';
import { assertCan } from '@/policies/ability';
import type { Window } from '../openings';
import { searchFacts, type SearchFacts } from './read-enquiries';

export type EnrolFacts = {
  enquiryId: string | null; studentId: string; studentName: string; guardianNames: string[]; familyId: string | null; familyName: string | null; level: number; subjectId: string;
  search: SearchFacts; windows: Window[]; siteId: string | null;
  /** The time and place of the trial, offered first when it is still free. */
  trialPlace: { teacherId: string; teacherName: string; roomId: string; roomName: string; siteId: string; startMin: number; lengthMinutes: number; localDate: LocalDate } | null;
};

/** What the enrolment form knows already: the student, who pays, the wishes, the trial's own time. */
export async function enrolFacts({ enquiryId, studentId }: { enquiryId: string | null; studentId: string | null }, context: Context): Promise<EnrolFacts | null> {
  const { db, ability } = context;
  assertCan(ability, 'create', 'Enrolment', {});
  const enquiry = enquiryId ? await findEnquiry(db, enquiryId) : undefined;
  const student = await findPerson(db, enquiry?.studentId ?? studentId ?? '');
  if (!student) return null;
  const [trial] = enquiry ? await trialsOfEnquiry(db, enquiry.id) : [];
  const lesson = trial ? await findOccurrence(db, trial.occurrenceId) : undefined;
  const [guardians, family, search] = [await guardiansOf(db, student.id), await familyOfStudent(db, student.id), await searchFacts(context)];
  return {
    enquiryId: enquiry?.id ?? null, studentId: student.id, studentName: fullName(student), guardianNames: guardians.map((guardian) => `${guardian.givenName} ${guardian.familyName}`.trim()),
    familyId: family?.id ?? null, familyName: family?.name ?? null, level: trial?.suggestedLevel ?? enquiry?.levelGuess ?? (await levelOfStudent(db, student.id)),
    subjectId: enquiry?.subjectId ?? search.subjects[0]?.id ?? '', search, windows: enquiry?.wishes ?? [], siteId: enquiry?.siteId ?? null,
    trialPlace: lesson ? placeOf(lesson, search.fromDate) : null,
  };
}

function placeOf(lesson: Occurrence, fromDate: LocalDate): EnrolFacts['trialPlace'] {
  if (!lesson.plannedTeacherId || !lesson.roomId) return null;
  const firstWeek = fromDate > lesson.localDate ? fromDate : addDays(lesson.localDate, 1);
  return {
    teacherId: lesson.plannedTeacherId, teacherName: lesson.teacherName ?? '', roomId: lesson.roomId, roomName: lesson.roomName ?? '', siteId: lesson.siteId, startMin: lesson.startMin,
    lengthMinutes: lesson.lengthMinutes, localDate: addDays(firstWeek, (weekdayOf(lesson.localDate) - weekdayOf(firstWeek) + 7) % 7),
  };
}
