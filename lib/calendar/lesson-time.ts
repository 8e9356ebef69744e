import { instantOf, sameClockTimeDaysBefore, type EpochSeconds, type LocalDate, type Span } from '../time';

/** What a family was promised: a date and a time on the wall at the site. */
export type LessonTime = { localDate: LocalDate; startMin: number; lengthMinutes: number; zone: string };

/** The instants behind the promise. The length is counted in real minutes from the start. */
export function spanOf({ localDate, startMin, lengthMinutes, zone }: LessonTime): Span {
  const startsAt = instantOf(localDate, startMin, zone);
  return { startsAt, endsAt: startsAt + lengthMinutes * 60 };
}

/**
 * House rule HR1: a lesson may be cancelled in good time up to and including the same clock time on the day
 * before, at the site. Across a clock change that is 23 or 25 real hours, and still "in time".
 */
export const cancelDeadlineOf = ({ localDate, startMin, zone }: Omit<LessonTime, 'lengthMinutes'>, daysBefore = 1): EpochSeconds =>
  sameClockTimeDaysBefore(localDate, startMin, zone, daysBefore);

/** When it was told counts, not when it was typed. */
export const absenceKind = (toldAt: EpochSeconds, cancelDeadlineAt: EpochSeconds): 'away_with_notice' | 'late_notice' =>
  toldAt <= cancelDeadlineAt ? 'away_with_notice' : 'late_notice';
