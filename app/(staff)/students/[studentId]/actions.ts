'use server';

import { revalidatePath } from 'next/cache';
import { askRecheckSchema, setPracticeSchema } from '@/lib/ladder/schema';
import { askForRecheck } from '@/lib/ladder/server/ask-recheck';
import { setPractice } from '@/lib/ladder/server/set-practice';
import { changeReachSchema } from '@/lib/people/schema';
import { changeReach } from '@/lib/people/server/change-reach';
import { action } from '@/lib/server/action';

const refresh = () => revalidatePath('/students/[studentId]', 'page');

export const saveReach = action(changeReachSchema, async (input, context) => {
  const saved = await changeReach(input, context);
  refresh();
  return saved;
});

export const askRecheck = action(askRecheckSchema, async (input, context) => {
  const asked = await askForRecheck(input, context);
  refresh();
  return asked;
});

export const givePractice = action(setPracticeSchema, async (input, context) => {
  const given = await setPractice(input, context);
  refresh();
  return given;
});
