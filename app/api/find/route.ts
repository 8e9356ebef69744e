import * as z from 'zod';
import { findAnything } from '@/lib/people/server/find-anything';
import { readRoute } from '@/lib/server/route';

export const GET = readRoute(z.object({ text: z.string().max(120) }), findAnything);
