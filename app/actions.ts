'use server';

import { revalidatePath } from 'next/cache';
import { switchHatSchema } from '@/lib/people/schema';
import { switchHat } from '@/lib/people/server/session';
import { action } from '@/lib/server/action';

export const wearHat = action(switchHatSchema, async (input, context) => {
  const worn = await switchHat(input, context);
  revalidatePath('/', 'layout');
  return worn;
});
