import * as z from 'zod';
import { jobProgress } from '@/lib/people/server/job-progress';
import { readRoute } from '@/lib/server/route';

export const GET = readRoute(z.object({ id: z.string().max(64) }), jobProgress);
