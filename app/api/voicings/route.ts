import * as z from 'zod';
import { SCORE_KINDS } from '@/lib/ladder/score-file';
import { voicingsFile } from '@/lib/ladder/server/voicings-file';
import { voicingQuerySchema } from '@/lib/ladder/voicing-finder';
import { readRoute } from '@/lib/server/route';

/** The found way as a file for a notation program or a sequencer. */
export const GET = readRoute(voicingQuerySchema.extend({ as: z.enum(SCORE_KINDS) }), voicingsFile);
