import * as z from 'zod';
import { SCORE_KINDS } from '@/lib/ladder/score-file';
import { practiceSheetFile } from '@/lib/ladder/server/practice-sheet';
import { readRoute } from '@/lib/server/route';

/** A practice sheet for a notation program or a sequencer. */
export const GET = readRoute(z.object({ rungId: z.string().max(64), keys: z.string().max(80).default('').transform((text) => text.split(',')), as: z.enum(SCORE_KINDS) }), practiceSheetFile);
