import * as z from 'zod';
import { isLocalDate } from '../time';
import { isTaughtWork } from './rates';

const seats = z.number('Enter a number of seats.').int('Whole seats.').min(1, 'At least one seat.').max(200, 'At most 200 seats.').nullable();

/** Mileage has no rate here: it is entered with each journey. */
export const RATED_WORK = ['lesson', 'group', 'trial', 'recital', 'rehearsal', 'meeting', 'admin', 'training', 'travel'] as const;

/** A rate from a day on. Empty narrows nothing: any lesson type, any length, a group of any size. */
export const beginRateSchema = z
  .object({
    engagementId: z.string().min(1, 'Choose a teacher.').max(64),
    workType: z.enum(RATED_WORK, 'Choose what is paid.'),
    lessonTypeId: z.string().max(64).nullable(),
    lengthMinutes: z.number('Enter minutes.').int('Whole minutes.').min(5, 'At least 5 minutes.').max(720, 'At most 12 hours.').nullable(),
    seatsFrom: seats,
    seatsTo: seats,
    per: z.enum(['lesson', 'hour'], 'Choose for what.'),
    amount: z.string().trim().min(1, 'Enter the rate.').max(20),
    validFrom: z.string().refine(isLocalDate, 'Enter a date that exists.'),
  })
  .refine(({ workType, per }) => isTaughtWork(workType) || per === 'hour', { path: ['per'], message: 'Work other than lessons is paid by the hour.' })
  .refine(({ seatsFrom, seatsTo }) => seatsTo === null || (seatsFrom !== null && seatsFrom <= seatsTo), { path: ['seatsTo'], message: 'From the smaller number of seats to the larger.' })
  // What a field means nothing for is left out, so that a rate is never narrowed by a field that was not to be seen.
  .transform(({ lessonTypeId, lengthMinutes, seatsFrom, seatsTo, ...rate }) => ({
    ...rate,
    lessonTypeId: isTaughtWork(rate.workType) && lessonTypeId !== '' ? lessonTypeId : null,
    lengthMinutes: isTaughtWork(rate.workType) ? lengthMinutes : null,
    seatsFrom: rate.workType === 'group' ? seatsFrom : null,
    seatsTo: rate.workType === 'group' ? seatsTo : null,
  }));
