'use server';

import { setUpSchema } from '@/lib/people/schema';
import { openSchool } from '@/lib/people/server/open-school';
import { publicAction } from '@/lib/server/action';
import { publicMoment } from '@/lib/server/request-facts';

export const setUpSchool = publicAction(setUpSchema, async (input) => {
  const moment = await publicMoment();
  await openSchool(input, moment);
  return { email: input.ownerEmail };
});
