'use server';

import { revalidatePath } from 'next/cache';
import { setPracticeSchema } from '@/lib/ladder/schema';
import { setPractice } from '@/lib/ladder/server/set-practice';
import { action } from '@/lib/server/action';

export const givePractice = action(setPracticeSchema, async (input, context) => {
  const given = await setPractice(input, context);
  revalidatePath(`/students/${input.studentId}`);
  return given;
});
