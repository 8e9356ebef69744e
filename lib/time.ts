import { Temporal } from 'temporal-polyfill';

/** Seconds since 1970-01-01T00:00Z. Columns and fields of this type end in `At`. */
export type EpochSeconds = number;
/** A calendar date at a site, `YYYY-MM-DD`. Columns and fields of this type end in `On` or `Date`. */
export type LocalDate = string;
/** Minutes after local midnight, 0 to 1439. Fields end in `Min`. */
export type MinuteOfDay = number;
/** Half-open, `[startsAt, endsAt)`: 16:00–16:30 and 16:30–17:00 touch and do not clash. */
export type Span = { startsAt: EpochSeconds; endsAt: EpochSeconds };

export const MINUTES_PER_DAY = 1440;

export const overlaps = (a: Span, b: Span): boolean => a.startsAt < b.endsAt && b.startsAt < a.endsAt;

/**
 * The instant of a wall-clock time in a zone. A lesson promises the wall clock; the instant is derived.
 * A time skipped by summer time moves to after the gap, one that comes twice means the first
 * (RFC 5545 section 3.3.5).
 */
export function instantOf(localDate: LocalDate, startMin: MinuteOfDay, zone: string): EpochSeconds {
  return zonedAt(localDate, startMin, zone).epochMilliseconds / 1000;
}

function zonedAt(localDate: LocalDate, startMin: MinuteOfDay, zone: string): Temporal.ZonedDateTime {
  const time = Temporal.PlainTime.from({ hour: Math.floor(startMin / 60), minute: startMin % 60 });
  return Temporal.PlainDate.from(localDate).toPlainDateTime(time).toZonedDateTime(zone, { disambiguation: 'compatible' });
}

const zonedOf = (at: EpochSeconds, zone: string) =>
  Temporal.Instant.fromEpochMilliseconds(at * 1000).toZonedDateTimeISO(zone);

export const localDateOf = (at: EpochSeconds, zone: string): LocalDate => zonedOf(at, zone).toPlainDate().toString();

export function minuteOfDayOf(at: EpochSeconds, zone: string): MinuteOfDay {
  const { hour, minute } = zonedOf(at, zone);
  return hour * 60 + minute;
}

export const addDays = (date: LocalDate, days: number): LocalDate => Temporal.PlainDate.from(date).add({ days }).toString();

/** The same day of the month, clamped to its end, always counted from the anchor: 31 Jan, 28 Feb, 31 Mar. */
export const addMonths = (anchor: LocalDate, months: number): LocalDate =>
  Temporal.PlainDate.from(anchor).add({ months }).toString();

export const daysBetween = (from: LocalDate, until: LocalDate): number =>
  Temporal.PlainDate.from(from).until(Temporal.PlainDate.from(until), { largestUnit: 'days' }).days;

/** 1 = Monday … 7 = Sunday (ISO 8601). */
export const weekdayOf = (date: LocalDate): number => Temporal.PlainDate.from(date).dayOfWeek;

export const mondayOf = (date: LocalDate): LocalDate => addDays(date, 1 - weekdayOf(date));

export function isLocalDate(text: string): boolean {
  if (!/^\d{4}-\d{2}-\d{2}$/.test(text)) return false;
  try {
    return Temporal.PlainDate.from(text, { overflow: 'reject' }).toString() === text;
  } catch {
    return false;
  }
}

export function isZone(name: string): boolean {
  try {
    Temporal.Instant.fromEpochMilliseconds(0).toZonedDateTimeISO(name);
    return true;
  } catch {
    return false;
  }
}

/** Whole years of age on a date; born on 29 February, the birthday is 1 March in common years. */
export function ageOn(bornOn: LocalDate, date: LocalDate): number {
  const born = Temporal.PlainDate.from(bornOn);
  const on = Temporal.PlainDate.from(date);
  const hadBirthday = on.month > born.month || (on.month === born.month && on.day >= born.day);
  return on.year - born.year - (hadBirthday ? 0 : 1);
}

/** The instant `days` earlier at the same wall-clock time: the cancel deadline rule across a clock change. */
export const sameClockTimeDaysBefore = (localDate: LocalDate, startMin: MinuteOfDay, zone: string, days: number): EpochSeconds =>
  instantOf(addDays(localDate, -days), startMin, zone);

/** "16:05" from 965. */
export const clockOf = (minute: MinuteOfDay): string =>
  `${String(Math.floor(minute / 60)).padStart(2, '0')}:${String(minute % 60).padStart(2, '0')}`;

/** 965 from "16:05"; null when there is no such time. */
export function minuteOfClock(text: string): MinuteOfDay | null {
  const match = /^(\d{1,2}):(\d{2})$/.exec(text.trim());
  if (!match) return null;
  const [hour, minute] = [Number(match[1]), Number(match[2])];
  return hour < 24 && minute < 60 ? hour * 60 + minute : null;
}
