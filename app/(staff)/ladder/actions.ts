'use server';

import { revalidatePath } from 'next/cache';
import * as z from 'zod';
import { addRungSchema, changeRungSchema, leaveOutRungSchema, publishEditionSchema, startEditionSchema } from '@/lib/ladder/schema';
import { addRung, changeRung, leaveOutRung, startEdition } from '@/lib/ladder/server/edit-edition';
import { installLadder } from '@/lib/ladder/server/install-ladder';
import { publishEdition } from '@/lib/ladder/server/publish-edition';
import { action } from '@/lib/server/action';

export const install = action(z.object({}), async (input, context) => {
  const installed = await installLadder(input, context);
  revalidatePath('/ladder');
  return installed;
});

const refresh = () => revalidatePath('/ladder', 'layout');

export const beginEdition = action(startEditionSchema, async (input, context) => {
  const begun = await startEdition(input, context);
  refresh();
  return begun;
});
export const saveRung = action(changeRungSchema, async (input, context) => {
  await changeRung(input, context);
  refresh();
});
export const putRung = action(addRungSchema, async (input, context) => {
  const added = await addRung(input, context);
  refresh();
  return added;
});
export const takeRungOut = action(leaveOutRungSchema, async (input, context) => {
  await leaveOutRung(input, context);
  refresh();
});
export const publish = action(publishEditionSchema, async (input, context) => {
  const published = await publishEdition(input, context);
  refresh();
  return published;
});
