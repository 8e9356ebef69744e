import * as z from 'zod';
import { daysBetween, isLocalDate, minuteOfClock } from '../time';

/** What compares two days is not asked where one of them does not exist. */
const localDateSchema = z.string().refine(isLocalDate, { error: 'Enter a date that exists.', abort: true });

const MAX_TERM_DAYS = 366;
const MAX_CLOSED_DAYS = 60;

export const addTermSchema = z
  .object({
    name: z.string().trim().min(1, 'Give the term a name, such as Autumn.').max(60, 'At most 60 characters.'),
    startsOn: localDateSchema,
    endsOn: localDateSchema,
  })
  .refine(({ startsOn, endsOn }) => startsOn < endsOn, { path: ['endsOn'], message: 'The last day comes after the first.' })
  .refine(({ startsOn, endsOn }) => daysBetween(startsOn, endsOn) <= MAX_TERM_DAYS, { path: ['endsOn'], message: 'A term is at most a year long. Look at the year of both days.' });

const clockSchema = z.string().trim().refine((text) => text === '' || minuteOfClock(text) !== null, 'Enter a time like 15:00, or leave both empty.').default('');

export const addClosureSchema = z
  .object({
    from: localDateSchema,
    until: localDateSchema,
    /** Empty: every site. */
    siteId: z.string().max(64).default(''),
    reason: z.string().trim().min(1, 'Say why, in the words families will read.').max(120, 'At most 120 characters.'),
    /** Both empty: from morning to evening. */
    fromTime: clockSchema,
    toTime: clockSchema,
  })
  .refine(({ from, until }) => from <= until, { path: ['until'], message: 'The last day does not come before the first.' })
  .refine(({ from, until }) => daysBetween(from, until) < MAX_CLOSED_DAYS, { path: ['until'], message: `At most ${MAX_CLOSED_DAYS} days at once. A longer break lies between two terms.` })
  .refine(({ fromTime, toTime }) => (fromTime === '') === (toTime === ''), { path: ['toTime'], message: 'Enter both times, or leave both empty.' })
  .refine(({ fromTime, toTime }) => fromTime === '' || toTime === '' || (minuteOfClock(fromTime) ?? 0) < (minuteOfClock(toTime) ?? 0), { path: ['toTime'], message: 'The end comes after the beginning.' });

export const closureSchema = z.object({ closureId: z.string().min(1).max(64) });
