'use server';

import { revalidatePath } from 'next/cache';
import * as z from 'zod';
import { absenceEffect, reportAbsence } from '@/lib/calendar/server/family-lessons';
import { action } from '@/lib/server/action';

const seatSchema = z.object({ seatId: z.string().max(64) });

export const askAbsenceEffect = action(seatSchema, absenceEffect);

export const sendAbsence = action(seatSchema, async (input, context) => {
  const told = await reportAbsence(input, context);
  revalidatePath('/', 'layout');
  return told;
});
