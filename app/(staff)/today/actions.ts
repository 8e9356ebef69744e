'use server';

import { revalidatePath } from 'next/cache';
import * as z from 'zod';
import { markAttendanceSchema } from '@/lib/calendar/schema';
import { checkIn, markAttendance } from '@/lib/calendar/server/mark-attendance';
import { action } from '@/lib/server/action';

export const mark = action(markAttendanceSchema, async (input, context) => {
  const marked = await markAttendance(input, context);
  revalidatePath('/today');
  return marked;
});

export const setCheckIn = action(z.object({ seatId: z.string().max(64), hasArrived: z.boolean() }), checkIn);
