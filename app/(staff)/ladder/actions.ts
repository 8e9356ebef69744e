'use server';

import { revalidatePath } from 'next/cache';
import * as z from 'zod';
import { installLadder } from '@/lib/ladder/server/install-ladder';
import { action } from '@/lib/server/action';

export const install = action(z.object({}), async (input, context) => {
  const installed = await installLadder(input, context);
  revalidatePath('/ladder');
  return installed;
});
