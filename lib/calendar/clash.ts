import { clockOf, minuteOfDayOf, overlaps, type Span } from '../time';

/** One thing in the calendar, as far as clashes go. */
export type Booking = Span & {
  siteId: string;
  roomId: string | null;
  teacherId: string | null;
  studentIds: readonly string[];
  /** How it is called to the person who is told of the clash. */
  label: string;
};

export type Names = { room: (id: string) => string; person: (id: string) => string; site: (id: string) => string };
export type ClashFacts = {
  zone: string;
  names: Names;
  /** Minutes that a room needs empty between two bookings. */
  turnoverMinutes: (roomId: string) => number;
  travelMinutes: (fromSiteId: string, toSiteId: string) => number;
};

export type Clash = {
  rule: 'room' | 'teacher' | 'student' | 'turnover' | 'travel' | 'capacity' | 'feature' | 'opening_hours' | 'availability' | 'qualification' | 'background_check' | 'closure' | 'long_stretch';
  /** Hard rules refuse; soft ones warn and are logged when passed over. */
  isHard: boolean;
  /** By how many minutes (or seats) it falls short. */
  amount: number;
  sentence: string;
};

const minutesBetween = (from: number, until: number) => Math.round((until - from) / 60);
const sharedMinutes = (a: Span, b: Span) => minutesBetween(Math.max(a.startsAt, b.startsAt), Math.min(a.endsAt, b.endsAt));

/**
 * Every clash of a wished booking with what is already there: the same teacher, student or room at once,
 * the room's turnover, and travel between sites (job map B17, catalogue C03). Touching is not overlapping.
 */
export function clashesOf(wished: Booking, others: readonly Booking[], facts: ClashFacts): Clash[] {
  return others.flatMap((other) => (overlaps(wished, other) ? overlapClashes(wished, other, facts) : gapClashes(wished, other, facts)));
}

function overlapClashes(wished: Booking, other: Booking, facts: ClashFacts): Clash[] {
  const minutes = sharedMinutes(wished, other);
  const when = `${clockAt(Math.max(wished.startsAt, other.startsAt), facts)}–${clockAt(Math.min(wished.endsAt, other.endsAt), facts)}`;
  const clashes: Clash[] = [];
  const add = (rule: 'room' | 'teacher' | 'student', name: string) =>
    clashes.push({ rule, isHard: true, amount: minutes, sentence: `${name} is taken by ${other.label} for ${minutes} minutes of it (${when}).` });
  if (wished.roomId && wished.roomId === other.roomId) add('room', facts.names.room(wished.roomId));
  if (wished.teacherId && wished.teacherId === other.teacherId) add('teacher', facts.names.person(wished.teacherId));
  for (const id of wished.studentIds) if (other.studentIds.includes(id)) add('student', facts.names.person(id));
  return clashes;
}

function gapClashes(wished: Booking, other: Booking, facts: ClashFacts): Clash[] {
  const gap = wished.startsAt >= other.endsAt ? minutesBetween(other.endsAt, wished.startsAt) : minutesBetween(wished.endsAt, other.startsAt);
  return [...turnoverClash(wished, other, gap, facts), ...travelClashes(wished, other, gap, facts)];
}

function turnoverClash(wished: Booking, other: Booking, gap: number, facts: ClashFacts): Clash[] {
  if (!wished.roomId || wished.roomId !== other.roomId) return [];
  const needed = facts.turnoverMinutes(wished.roomId);
  if (gap >= needed) return [];
  const room = facts.names.room(wished.roomId);
  const sentence = `${room} needs ${needed} minutes between bookings; next to ${other.label} there are ${gap}, short by ${needed - gap}.`;
  return [{ rule: 'turnover', isHard: true, amount: needed - gap, sentence }];
}

function travelClashes(wished: Booking, other: Booking, gap: number, facts: ClashFacts): Clash[] {
  if (wished.siteId === other.siteId) return [];
  const [from, to] = wished.startsAt >= other.endsAt ? [other.siteId, wished.siteId] : [wished.siteId, other.siteId];
  const needed = facts.travelMinutes(from, to);
  if (gap >= needed) return [];
  const shared = [
    ...(wished.teacherId && wished.teacherId === other.teacherId ? [wished.teacherId] : []),
    ...wished.studentIds.filter((id) => other.studentIds.includes(id)),
  ];
  return shared.map((id) => ({
    rule: 'travel' as const, isHard: true, amount: needed - gap,
    sentence: `${facts.names.person(id)} is short by ${needed - gap} minutes to get from ${facts.names.site(from)} to ${facts.names.site(to)} (${needed} needed).`,
  }));
}

const clockAt = (at: number, { zone }: ClashFacts) => clockOf(minuteOfDayOf(at, zone));

/** A soft note for a student whose lessons touch: "60 minutes in a row". */
export function longStretchNote(wished: Booking, others: readonly Booking[], { names }: Pick<ClashFacts, 'names'>): Clash[] {
  return wished.studentIds.flatMap((id) => {
    const touching = others.filter((other) => other.studentIds.includes(id) && (other.endsAt === wished.startsAt || other.startsAt === wished.endsAt));
    if (touching.length === 0) return [];
    const minutes = minutesBetween(wished.startsAt, wished.endsAt) + touching.reduce((sum, other) => sum + minutesBetween(other.startsAt, other.endsAt), 0);
    return [{ rule: 'long_stretch' as const, isHard: false, amount: minutes, sentence: `${minutes} minutes in a row for ${names.person(id)}.` }];
  });
}

/** More people than the room seats. */
export function capacityClash(wanted: number, seats: number, roomName: string): Clash[] {
  if (wanted <= seats) return [];
  return [{ rule: 'capacity', isHard: true, amount: wanted - seats, sentence: `${roomName} has ${seats} seats; over by ${wanted - seats}.` }];
}
