'use server';

import { installLadder } from '@/lib/ladder/server/install-ladder';
import { setUpSchema } from '@/lib/people/schema';
import { openSchool } from '@/lib/people/server/open-school';
import { publicAction } from '@/lib/server/action';
import { publicMoment } from '@/lib/server/request-facts';
import { contextOfUser } from '@/lib/server/user-context';

export const setUpSchool = publicAction(setUpSchema, async (input) => {
  const moment = await publicMoment();
  const { userId } = await openSchool(input, moment);
  const owner = await contextOfUser(moment.db, userId, moment.now);
  if (owner) await installLadder({}, owner);
  return { email: input.ownerEmail };
});
