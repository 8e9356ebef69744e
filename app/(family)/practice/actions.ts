'use server';

import { revalidatePath } from 'next/cache';
import { finishPracticeSchema, itHurtsSchema } from '@/lib/ladder/schema';
import { finishPractice } from '@/lib/ladder/server/finish-practice';
import { itHurts } from '@/lib/ladder/server/it-hurts';
import { action } from '@/lib/server/action';

export const keepPractice = action(finishPracticeSchema, async (input, context) => {
  const kept = await finishPractice(input, context);
  revalidatePath('/practice');
  return kept;
});

export const sayItHurts = action(itHurtsSchema, async (input, context) => {
  const said = await itHurts(input, context);
  revalidatePath('/practice');
  return said;
});
