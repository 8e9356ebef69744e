import 'server-only';
import type { Db } from '@/db/connection';
import { bookingsTouching } from '@/db/bookings';
import { requiredFeatures, type LessonType } from '@/db/lesson-types';
import { findPeople, fullName, type Person } from '@/db/people';
import { allSites, liveRooms, openingSpans, travelTimes, type Room } from '@/db/rooms';
import { availabilityOn, clearedTeachers, qualificationsOn } from '@/db/teachers';
import { closuresBetween } from '@/db/terms';
import { ageOn, clockOf, weekdayOf, type LocalDate } from '@/lib/time';
import { capacityClash, clashesOf, longStretchNote, type Booking, type Clash, type ClashFacts } from '../clash';
import { spanOf, type LessonTime } from '../lesson-time';
import { closedDatesFor } from '../term';

export type BookingWish = LessonTime & {
  lessonType: LessonType;
  subjectId: string | null;
  /** Level to be taught, when the lesson is on the ladder. */
  level: number | null;
  title: string;
  siteId: string;
  roomId: string | null;
  teacherId: string | null;
  studentIds: readonly string[];
  mode: 'in_room' | 'online';
};

const ADULT_AGE = 18;
/** Nobody needs longer between two sites; bookings further apart cannot clash. */
const LONGEST_GAP_SECONDS = 3 * 3600;

/**
 * Every rule that a wished booking breaks, hard ones first, each with its sentence and amount (job map B17).
 * `ignoreOccurrenceId` leaves out the lesson that is being moved.
 */
export async function clashesWith(db: Db, wish: BookingWish, ignoreOccurrenceId: string | null = null): Promise<Clash[]> {
  const [rooms, people] = [await liveRooms(db), await findPeople(db, [...wish.studentIds, ...(wish.teacherId ? [wish.teacherId] : [])])];
  const room = rooms.find(({ id }) => id === wish.roomId);
  const calendar = await calendarClashes(db, wish, { rooms, people, ignoreOccurrenceId });
  const seats = room ? capacityClash(wish.studentIds.length, room.personLimit, room.name) : [];
  return [...calendar, ...seats, ...(await featureClashes(db, wish, room)), ...(await placeClashes(db, wish)), ...(await teacherClashes(db, wish, people))].sort((a, b) => Number(b.isHard) - Number(a.isHard));
}

type Known = { rooms: Room[]; people: Person[]; ignoreOccurrenceId: string | null };

async function calendarClashes(db: Db, wish: BookingWish, { rooms, people, ignoreOccurrenceId }: Known): Promise<Clash[]> {
  const span = spanOf(wish);
  const wished: Booking = { ...span, siteId: wish.siteId, roomId: wish.roomId, teacherId: wish.teacherId, studentIds: wish.studentIds, label: wish.title };
  const around = { startsAt: span.startsAt - LONGEST_GAP_SECONDS, endsAt: span.endsAt + LONGEST_GAP_SECONDS };
  const others = (await bookingsTouching(db, around)).filter(({ occurrenceId }) => occurrenceId === null || occurrenceId !== ignoreOccurrenceId);
  const facts = await clashFacts(db, wish.zone, rooms, people);
  return [...clashesOf(wished, others, facts), ...longStretchNote(wished, others, facts)];
}

async function clashFacts(db: Db, zone: string, rooms: Room[], people: Person[]): Promise<ClashFacts> {
  const [sites, times] = [await allSites(db), await travelTimes(db)];
  return {
    zone,
    names: {
      room: (id) => rooms.find((room) => room.id === id)?.name ?? 'The room',
      person: (id) => nameIn(people, id),
      site: (id) => sites.find((site) => site.id === id)?.name ?? 'the other site',
    },
    turnoverMinutes: (roomId) => rooms.find((room) => room.id === roomId)?.turnoverMin ?? 0,
    travelMinutes: (from, to) => times.find((time) => time.fromSiteId === from && time.toSiteId === to)?.minutes ?? 0,
  };
}

function nameIn(people: Person[], id: string): string {
  const person = people.find((candidate) => candidate.id === id);
  return person ? fullName(person) : 'This person';
}

/** What this kind of lesson must find in its room and does not. */
async function featureClashes(db: Db, { lessonType }: BookingWish, room: Room | undefined): Promise<Clash[]> {
  if (!room) return [];
  const missing = (await requiredFeatures(db, lessonType.id)).filter(({ code }) => !room.features.includes(code));
  return missing.map(({ label }) => ({ rule: 'feature', isHard: true, amount: 1, sentence: `${room.name} has no ${label}, which this kind of lesson needs.` }));
}

async function placeClashes(db: Db, wish: BookingWish): Promise<Clash[]> {
  const closures = await closuresBetween(db, wish.localDate, wish.localDate);
  const clashes: Clash[] = [];
  const closed = closures.find((closure) => closedDatesFor([closure], wish.siteId, wish.startMin, wish.lengthMinutes).has(wish.localDate));
  if (closed) clashes.push({ rule: 'closure', isHard: true, amount: 1, sentence: `The school is closed then: ${closed.reason}.` });
  const spans = (await openingSpans(db)).filter(({ siteId, weekday }) => siteId === wish.siteId && weekday === weekdayOf(wish.localDate));
  const end = wish.startMin + wish.lengthMinutes;
  if (!spans.some(({ fromMin, toMin }) => fromMin <= wish.startMin && end <= toMin)) {
    const hours = spans.map(({ fromMin, toMin }) => `${clockOf(fromMin)}–${clockOf(toMin)}`).join(', ') || 'closed that day';
    clashes.push({ rule: 'opening_hours', isHard: true, amount: wish.lengthMinutes, sentence: `Outside opening hours (${hours}).` });
  }
  return clashes;
}

async function teacherClashes(db: Db, wish: BookingWish, people: Person[]): Promise<Clash[]> {
  const { teacherId, localDate } = wish;
  if (!teacherId) return [];
  const name = nameIn(people, teacherId);
  return [
    ...(await availabilityClash(db, wish, teacherId, name)), ...(await qualificationClash(db, wish, teacherId, name)),
    ...(hasMinor(people, wish.studentIds, localDate) && !(await clearedTeachers(db, localDate)).has(teacherId)
      ? [{ rule: 'background_check' as const, isHard: true, amount: 1, sentence: `${name} has no valid background check on that day and cannot be planned with a student under ${ADULT_AGE}.` }]
      : []),
  ];
}

async function availabilityClash(db: Db, wish: BookingWish, teacherId: string, name: string): Promise<Clash[]> {
  const spans = (await availabilityOn(db, wish.localDate)).filter(({ personId, weekday }) => personId === teacherId && weekday === weekdayOf(wish.localDate));
  const isAvailable = spans.some(({ siteId, fromMin, toMin }) =>
    (siteId === null || siteId === wish.siteId) && fromMin <= wish.startMin && wish.startMin + wish.lengthMinutes <= toMin);
  return isAvailable ? [] : [{ rule: 'availability', isHard: true, amount: wish.lengthMinutes, sentence: `${name} does not teach here at that time.` }];
}

async function qualificationClash(db: Db, { subjectId, level, localDate }: BookingWish, teacherId: string, name: string): Promise<Clash[]> {
  if (!subjectId || level === null) return [];
  const held = (await qualificationsOn(db, subjectId, localDate)).filter(({ personId }) => personId === teacherId);
  if (held.some(({ levelFrom, levelTo }) => levelFrom <= level && level <= levelTo)) return [];
  const highest = Math.max(0, ...held.map(({ levelTo }) => levelTo));
  const sentence = highest === 0 ? `${name} is not qualified for this subject.` : `${name} is qualified to level ${highest}, not ${level}.`;
  return [{ rule: 'qualification', isHard: true, amount: level - highest, sentence }];
}

/** A student without a known birthday counts as under age. */
export const hasMinor = (people: readonly Person[], studentIds: readonly string[], date: LocalDate): boolean =>
  people.some(({ id, bornOn }) => studentIds.includes(id) && (bornOn === null || ageOn(bornOn, date) < ADULT_AGE));
