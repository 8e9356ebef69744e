import 'server-only';
import { enquiryEvents, findEnquiry, listEnquiries, trialsOfEnquiry, type Enquiry } from '@/db/enquiries';
import { allSubjects } from '@/db/lesson-types';
import { findOccurrence } from '@/db/occurrences';
import { offersOfEnquiry } from '@/db/opening-offers';
import { fullName } from '@/db/people';
import { allFeatures, allSites, liveRooms } from '@/db/rooms';
import { liveTeachers } from '@/db/teachers';
import { currentOrNextTerm } from '@/db/terms';
import type { Context } from '@/lib/server/context';
import { addDays } from '@/lib/time';
import { assertCan } from '@/policies/ability';
import { OPEN_ENQUIRY_STATES } from '../enquiry-words';

/** Enquiries that are still open, oldest first, and those that ended lately. */
export async function readEnquiries({ db, ability }: Context): Promise<{ open: Enquiry[]; ended: Enquiry[] }> {
  assertCan(ability, 'read', 'Enquiry', {});
  const ended = await listEnquiries(db, ['enrolled', 'closed']);
  return { open: await listEnquiries(db, OPEN_ENQUIRY_STATES), ended: ended.slice(-30).reverse() };
}

export type EnquiryScreen = NonNullable<Awaited<ReturnType<typeof readEnquiry>>>;

export async function readEnquiry({ id }: { id: string }, { db, ability, today }: Context) {
  const enquiry = await findEnquiry(db, id);
  if (!enquiry) return null;
  assertCan(ability, 'read', 'Enquiry', enquiry);
  const [teachers, rooms, offers, trials] = [await liveTeachers(db, today), await liveRooms(db), await offersOfEnquiry(db, id), await trialsOfEnquiry(db, id)];
  const nameOf = (teacherId: string) => { const teacher = teachers.find((candidate) => candidate.id === teacherId); return teacher ? fullName(teacher) : 'a teacher'; };
  const named = offers.map((offer) => ({ ...offer, teacherName: nameOf(offer.teacherId), roomName: rooms.find((room) => room.id === offer.roomId)?.name ?? '' }));
  const [trial] = trials;
  return { enquiry, offers: named, trial: trial ? { ...trial, lesson: (await findOccurrence(db, trial.occurrenceId)) ?? null } : null, events: await enquiryEvents(db, id) };
}

export type SearchFacts = Awaited<ReturnType<typeof searchFacts>>;

/** What the search form offers, and where it begins: from tomorrow to the end of the term. */
export async function searchFacts({ db, today }: Pick<Context, 'db' | 'today'>) {
  const term = await currentOrNextTerm(db, today);
  return {
    subjects: await allSubjects(db), sites: (await allSites(db)).map(({ id, name }) => ({ id, name })), features: await allFeatures(db),
    fromDate: term && term.startsOn > today ? term.startsOn : addDays(today, 1), termEndsOn: term?.endsOn ?? addDays(today, 90),
  };
}
