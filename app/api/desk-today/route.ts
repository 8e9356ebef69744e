import { dayQuerySchema } from '@/lib/calendar/schema';
import { deskToday } from '@/lib/calendar/server/desk-today';
import { readRoute } from '@/lib/server/route';

/** Feeds the room board, which asks again every moment. */
export const GET = readRoute(dayQuerySchema, deskToday);
