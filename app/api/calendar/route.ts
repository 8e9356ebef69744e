import { calendarQuerySchema } from '@/lib/calendar/schema';
import { calendarEntries } from '@/lib/calendar/server/calendar-week';
import { readRoute } from '@/lib/server/route';

/** Feeds the calendar, which asks again as the person pages through weeks. */
export const GET = readRoute(calendarQuerySchema, calendarEntries);
