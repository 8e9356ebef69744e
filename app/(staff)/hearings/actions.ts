'use server';

import { revalidatePath } from 'next/cache';
import { agreeHearingSchema, decideHearingSchema, recordProofSchema, startHearingSchema, stopHearingSchema, undoHearingSchema } from '@/lib/ladder/schema';
import { agreeHearing } from '@/lib/ladder/server/agree-hearing';
import { decideHearing, stopHearing } from '@/lib/ladder/server/decide-hearing';
import { recordProof } from '@/lib/ladder/server/record-proof';
import { startHearing } from '@/lib/ladder/server/start-hearing';
import { undoHearing } from '@/lib/ladder/server/undo-hearing';
import { action } from '@/lib/server/action';

const refresh = () => revalidatePath('/hearings/[studentId]', 'page');

export const beginHearing = action(startHearingSchema, async (input, context) => {
  const begun = await startHearing(input, context);
  refresh();
  return begun;
});

export const agreeToHearing = action(agreeHearingSchema, async (input, context) => {
  const agreed = await agreeHearing(input, context);
  refresh();
  return agreed;
});

/** Does not refresh: the screen keeps the rhythm of the lesson and knows its own keys. */
export const sendProof = action(recordProofSchema, recordProof);

export const decide = action(decideHearingSchema, async (input, context) => {
  const decided = await decideHearing(input, context);
  refresh();
  return decided;
});

export const stop = action(stopHearingSchema, async (input, context) => {
  await stopHearing(input, context);
  refresh();
});

export const undo = action(undoHearingSchema, async (input, context) => {
  const undone = await undoHearing(input, context);
  refresh();
  return undone;
});
