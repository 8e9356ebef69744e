import 'server-only';
import type * as z from 'zod';
import { takenSpans } from '@/db/holds';
import { fullName } from '@/db/people';
import { allFeatures, allSites, liveRooms } from '@/db/rooms';
import { availabilityOn, clearedTeachers, liveTeachers, qualificationsOn } from '@/db/teachers';
import { closuresBetween } from '@/db/terms';
import { openingSpans } from '@/db/rooms';
import { AppError } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import { addDays, daysBetween, instantOf, weekdayOf, type LocalDate, type Span } from '@/lib/time';
import { assertCan } from '@/policies/ability';
import { dayClock, sortedBusy, type Busy } from '../busy';
import { findOpenings, freeWords, type Opening, type OpeningSearch, type RoomTimes, type TeacherTimes, type Window } from '../openings';
import type { openingSearchSchema } from '../schema';

export type NamedOpening = Opening & {
  /** The date of a single lesson, or the first of a weekly one. */
  localDate: LocalDate; teacherName: string; roomName: string; siteName: string; roomDescription: string; freeWords: string;
};
export type FoundOpenings = { openings: NamedOpening[]; nearMisses: (NamedOpening & { sentence: string })[] };
type Search = z.output<typeof openingSearchSchema>;

const LONGEST_SEARCH_DAYS = 200;
const SHOWN = 12;

/** What the desk reads out while the caller is on the line: true openings, best first, then near misses. */
export async function findOpeningsFor(search: Search, context: Context): Promise<FoundOpenings> {
  assertCan(context.ability, 'create', 'Occurrence', {});
  if (search.untilDate < search.fromDate) throw new AppError('invalid', 'The last day must come after the first.', { untilDate: ['Choose a later day.'] });
  if (daysBetween(search.fromDate, search.untilDate) > LONGEST_SEARCH_DAYS) throw new AppError('invalid', 'Search at most half a year at once.', { untilDate: ['Choose an earlier day.'] });
  const facts = await openingFacts(search, context);
  const rules = { lengthMinutes: search.lengthMinutes, level: search.level, features: search.features, windows: search.windows, siteIds: search.siteId ? [search.siteId] : null, gridMinutes: 15 };
  const searches = dateGroups(await datesByWeekday(search, context), search.isWeekly);
  const found = searches.map((datesByWeekday) => findOpenings({ ...rules, datesByWeekday } satisfies OpeningSearch, facts));
  const byWorth = (a: Opening, b: Opening) => (search.isWeekly ? b.score - a.score : 0);
  return {
    openings: found.flatMap(({ openings }) => openings).sort(byWorth).slice(0, SHOWN).map((opening) => named(opening, facts)),
    nearMisses: found.flatMap(({ nearMisses }) => nearMisses).slice(0, 4).map((miss) => ({ ...named(miss, facts), sentence: miss.sentence })),
  };
}

/** A weekly lesson is judged over all its dates at once; single lessons date by date, soonest first. */
function dateGroups(byWeekday: ReadonlyMap<number, LocalDate[]>, isWeekly: boolean): ReadonlyMap<number, LocalDate[]>[] {
  if (isWeekly) return [byWeekday];
  return [...byWeekday].flatMap(([weekday, dates]) => dates.map((date) => ({ weekday, date })))
    .sort((a, b) => a.date.localeCompare(b.date)).map(({ weekday, date }) => new Map([[weekday, [date]]]));
}

async function datesByWeekday(search: Search, { db, today }: Context): Promise<Map<number, LocalDate[]>> {
  const closed = new Set((await closuresBetween(db, search.fromDate, search.untilDate)).filter(({ fromMin }) => fromMin === null).map(({ closedOn }) => closedOn));
  const wanted = new Set(search.windows.map(({ weekday }) => weekday));
  const dates = new Map<number, LocalDate[]>();
  for (let date = search.fromDate > today ? search.fromDate : addDays(today, 1); date <= search.untilDate; date = addDays(date, 1)) {
    const weekday = weekdayOf(date);
    if (wanted.has(weekday) && !closed.has(date)) dates.set(weekday, [...(dates.get(weekday) ?? []), date]);
  }
  return dates;
}

type Facts = Awaited<ReturnType<typeof openingFacts>>;

async function openingFacts(search: Search, { db, school, today }: Context) {
  const span: Span = { startsAt: instantOf(search.fromDate, 0, school.zone), endsAt: instantOf(addDays(search.untilDate, 1), 0, school.zone) };
  const [rooms, sites, features, teachers] = [await liveRooms(db), await allSites(db), await allFeatures(db), await liveTeachers(db, today)];
  const [qualified, available, cleared] = [await qualificationsOn(db, search.subjectId, search.fromDate), await availabilityOn(db, search.fromDate), await clearedTeachers(db, search.untilDate)];
  const busyTeachers = busyOf(await takenSpans(db, 'teacher', teachers.map(({ id }) => id), span));
  const busyRooms = busyOf(await takenSpans(db, 'room', rooms.map(({ id }) => id), span));
  const open = await openingSpans(db);
  const teacherTimes = teachers.filter(({ id }) => cleared.has(id)).flatMap((teacher): TeacherTimes[] => {
    const levels = qualified.filter(({ personId }) => personId === teacher.id);
    const availability = available.filter(({ personId }) => personId === teacher.id)
      .flatMap(({ siteId, ...window }) => sites.filter((site) => siteId === null || site.id === siteId).map((site) => ({ ...window, siteId: site.id })))
      .flatMap((window) => withinOpening(window, open));
    return levels.map(({ levelFrom, levelTo }) => ({ id: teacher.id, name: fullName(teacher), levelFrom, levelTo, availability, busy: busyTeachers.get(teacher.id) ?? [] }));
  });
  const roomTimes = rooms.map((room): RoomTimes => ({ ...room, features: new Set(room.features), turnoverMinutes: room.turnoverMin, busy: busyRooms.get(room.id) ?? [] }));
  return { teachers: teacherTimes, rooms: roomTimes, clock: dayClock(school.zone), sites, featureLabel: (code: string) => features.find((feature) => feature.code === code)?.label ?? code, roomRows: rooms };
}

/** The part of a teacher's time in which the site is open. */
function withinOpening(window: Window & { siteId: string }, open: readonly (Window & { siteId: string })[]): (Window & { siteId: string })[] {
  return open.filter((span) => span.siteId === window.siteId && span.weekday === window.weekday)
    .map((span) => ({ ...window, fromMin: Math.max(window.fromMin, span.fromMin), toMin: Math.min(window.toMin, span.toMin) }))
    .filter(({ fromMin, toMin }) => fromMin < toMin);
}

function busyOf(spans: readonly (Span & { holderId: string })[]): Map<string, Busy> {
  const grouped = new Map<string, Span[]>();
  for (const span of spans) grouped.set(span.holderId, [...(grouped.get(span.holderId) ?? []), span]);
  return new Map([...grouped].map(([id, list]) => [id, sortedBusy(list)]));
}

function named(opening: Opening, { teachers, roomRows, sites }: Facts): NamedOpening {
  const room = roomRows.find(({ id }) => id === opening.roomId);
  return {
    ...opening, localDate: opening.freeDates[0] ?? '', teacherName: teachers.find(({ id }) => id === opening.teacherId)?.name ?? '',
    roomName: room?.name ?? '', roomDescription: room?.description ?? '', siteName: sites.find(({ id }) => id === opening.siteId)?.name ?? '', freeWords: freeWords(opening),
  };
}
