'use server';

import { revalidatePath } from 'next/cache';
import { bookTrialSchema, enrolSchema, holdOpeningSchema, openingSearchSchema } from '@/lib/calendar/schema';
import { bookTrial } from '@/lib/calendar/server/book-trial';
import { enrolStudent } from '@/lib/calendar/server/enrol-student';
import { findOpeningsFor } from '@/lib/calendar/server/find-openings-for';
import { holdOpening, releaseOpening } from '@/lib/calendar/server/hold-opening';
import { action } from '@/lib/server/action';

export const searchOpenings = action(openingSearchSchema, findOpeningsFor);

export const hold = action(holdOpeningSchema, async (input, context) => {
  const held = await holdOpening(input, context);
  revalidatePath('/enquiries', 'layout');
  return held;
});

export const release = action(bookTrialSchema, async (input, context) => {
  await releaseOpening(input, context);
  revalidatePath('/enquiries', 'layout');
});

export const bookHeldTrial = action(bookTrialSchema, async (input, context) => {
  const booked = await bookTrial(input, context);
  revalidatePath('/enquiries', 'layout');
  return booked;
});

export const enrol = action(enrolSchema, async (input, context) => {
  const enrolled = await enrolStudent(input, context);
  revalidatePath('/', 'layout');
  return enrolled;
});
