import type { LocalDate, Span } from '../time';
import { freeOn, type Busy, type DayClock } from './busy';

export type Window = { weekday: number; fromMin: number; toMin: number };
export type TeacherTimes = {
  id: string; name: string; levelFrom: number; levelTo: number;
  availability: (Window & { siteId: string })[];
  busy: Busy;
};
export type RoomTimes = { id: string; name: string; siteId: string; features: ReadonlySet<string>; turnoverMinutes: number; busy: Busy };

export type OpeningSearch = {
  lengthMinutes: number;
  level: number;
  /** Feature codes the room must have. */
  features: readonly string[];
  windows: readonly Window[];
  siteIds: readonly string[] | null;
  /** Dates by weekday on which the lesson would take place; one date for a single lesson. */
  datesByWeekday: ReadonlyMap<number, readonly LocalDate[]>;
  gridMinutes: number;
};

export type Opening = {
  weekday: number; startMin: number; lengthMinutes: number; teacherId: string; roomId: string; siteId: string;
  /** Dates on which everything is free, and those on which it is not. */
  freeDates: LocalDate[]; takenDates: LocalDate[];
  score: number;
};
export type NearMiss = Opening & { sentence: string };

type Facts = { teachers: readonly TeacherTimes[]; rooms: readonly RoomTimes[]; clock: DayClock; featureLabel: (code: string) => string };
type Candidate = { teacher: TeacherTimes; weekday: number; startMin: number; siteId: string; dates: readonly LocalDate[]; overstayMinutes: number };

/** A near miss asks the family for at most this many minutes more than they offered. */
const LONGEST_OVERSTAY_MINUTES = 30;

/**
 * Every opening that satisfies all rules (teacher qualified, available and free; a room with what is needed, free,
 * turnover kept; inside the family's wishes), best first, then near misses with the one rule in the way
 * (job map B17, catalogue C04). Compared with brute force in the tests.
 */
export function findOpenings(search: OpeningSearch, facts: Facts): { openings: Opening[]; nearMisses: NearMiss[] } {
  const openings: Opening[] = [];
  const nearMisses: NearMiss[] = [];
  for (const candidate of candidatesOf(search, facts)) {
    const asking = { lengthMinutes: search.lengthMinutes, clock: facts.clock };
    const teacherFree = freeDates(candidate, asking, candidate.teacher.busy);
    if (teacherFree.length === 0) continue;
    const rooms = facts.rooms.filter((room) => room.siteId === candidate.siteId);
    const fitting = bestRoom(rooms.filter((room) => hasAll(room, search.features)), { ...candidate, free: teacherFree }, asking);
    if (fitting && candidate.overstayMinutes === 0) openings.push(openingOf(candidate, fitting, search));
    else if (fitting) nearMisses.push({ ...openingOf(candidate, fitting, search), sentence: `the family would have to stay ${candidate.overstayMinutes} minutes longer` });
    else if (candidate.overstayMinutes === 0) nearMisses.push(...withoutFeature(rooms, { ...candidate, free: teacherFree }, { search, facts }));
  }
  return { openings: openings.sort(byScore), nearMisses: nearMisses.filter(({ takenDates }) => takenDates.length === 0).sort(byScore) };
}

function* candidatesOf(search: OpeningSearch, { teachers }: Facts): Generator<Candidate> {
  for (const teacher of teachers) {
    if (search.level < teacher.levelFrom || search.level > teacher.levelTo) continue;
    for (const span of teacher.availability) {
      if (search.siteIds && !search.siteIds.includes(span.siteId)) continue;
      const dates = search.datesByWeekday.get(span.weekday) ?? [];
      if (dates.length > 0) yield* startsWithin(span, search, { teacher, weekday: span.weekday, siteId: span.siteId, dates });
    }
  }
}

function* startsWithin(span: Window, search: OpeningSearch, rest: Omit<Candidate, 'startMin' | 'overstayMinutes'>): Generator<Candidate> {
  const first = Math.ceil(span.fromMin / search.gridMinutes) * search.gridMinutes;
  for (let startMin = first; startMin + search.lengthMinutes <= span.toMin; startMin += search.gridMinutes) {
    const overstayMinutes = overstayOf(search, span.weekday, startMin);
    if (overstayMinutes !== null) yield { ...rest, startMin, overstayMinutes };
  }
}

/** 0 inside the family's wishes; minutes beyond the end of one they could at least start in; null when it does not fit at all. */
function overstayOf({ windows, lengthMinutes }: OpeningSearch, weekday: number, startMin: number): number | null {
  const overstays = windows
    .filter((window) => window.weekday === weekday && window.fromMin <= startMin && startMin < window.toMin)
    .map((window) => Math.max(0, startMin + lengthMinutes - window.toMin))
    .filter((minutes) => minutes <= LONGEST_OVERSTAY_MINUTES);
  return overstays.length === 0 ? null : Math.min(...overstays);
}

const hasAll = (room: RoomTimes, features: readonly string[]) => features.every((code) => room.features.has(code));

type Asking = { lengthMinutes: number; clock: DayClock };
type PartlyFree = Candidate & { free: readonly LocalDate[] };

function freeDates({ dates, startMin }: Pick<Candidate, 'dates' | 'startMin'>, { lengthMinutes, clock }: Asking, busy: Busy, padMinutes = 0): LocalDate[] {
  return dates.filter((date) => freeOn(busy, padded(clock.span(date, startMin, lengthMinutes), padMinutes)));
}

const padded = ({ startsAt, endsAt }: Span, minutes: number): Span => ({ startsAt, endsAt: endsAt + minutes * 60 });

type Fit = { room: RoomTimes; free: LocalDate[] };

/** The room that is free on most of the teacher's free dates; the plainer room first, so that the grand stays free. */
function bestRoom(rooms: readonly RoomTimes[], candidate: PartlyFree, asking: Asking): Fit | null {
  let best: Fit | null = null;
  for (const room of [...rooms].sort((a, b) => a.features.size - b.features.size)) {
    const free = freeDates({ dates: candidate.free, startMin: candidate.startMin }, asking, room.busy, room.turnoverMinutes);
    if (free.length > (best?.free.length ?? 0)) best = { room, free };
    if (best && best.free.length === candidate.dates.length) break;
  }
  return best;
}

function withoutFeature(rooms: readonly RoomTimes[], candidate: PartlyFree, { search, facts }: { search: OpeningSearch; facts: Facts }): NearMiss[] {
  const lacking = rooms.filter((room) => search.features.filter((code) => !room.features.has(code)).length === 1);
  const fit = bestRoom(lacking, candidate, { lengthMinutes: search.lengthMinutes, clock: facts.clock });
  const missing = fit ? search.features.find((code) => !fit.room.features.has(code)) : undefined;
  if (!fit || !missing) return [];
  return [{ ...openingOf(candidate, fit, search), sentence: `no ${facts.featureLabel(missing)} in ${fit.room.name}` }];
}

function openingOf(candidate: Candidate, { room, free }: Fit, { lengthMinutes }: OpeningSearch): Opening {
  const taken = candidate.dates.filter((date) => !free.includes(date));
  return {
    weekday: candidate.weekday, startMin: candidate.startMin, lengthMinutes, teacherId: candidate.teacher.id, roomId: room.id,
    siteId: candidate.siteId, freeDates: free, takenDates: taken,
    score: free.length * 100 - taken.length * 300 - candidate.overstayMinutes * 5 - room.features.size,
  };
}

const byScore = (a: Opening, b: Opening) => b.score - a.score || a.weekday - b.weekday || a.startMin - b.startMin || a.teacherId.localeCompare(b.teacherId);

/** "free on 13 of 15", or nothing to add when every date is free. */
export const freeWords = ({ freeDates: free, takenDates }: Opening): string =>
  takenDates.length === 0 ? '' : `free on ${free.length} of ${free.length + takenDates.length}`;
