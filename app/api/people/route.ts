import * as z from 'zod';
import { pickPeople } from '@/lib/people/server/pick-people';
import { readRoute } from '@/lib/server/route';

export const GET = readRoute(z.object({ kind: z.enum(['student', 'teacher']), text: z.string().max(120) }), pickPeople);
