'use server';

import { revalidatePath } from 'next/cache';
import * as z from 'zod';
import { switchHatSchema } from '@/lib/people/schema';
import { signOutEverywhere, switchHat } from '@/lib/people/server/session';
import { action } from '@/lib/server/action';

export const wearHat = action(switchHatSchema, async (input, context) => {
  const worn = await switchHat(input, context);
  revalidatePath('/', 'layout');
  return worn;
});

export const endAllSessions = action(z.object({}), signOutEverywhere);
