'use server';

import { resetRequestSchema, setPasswordSchema } from '@/lib/people/schema';
import { requestReset, setPasswordByLink } from '@/lib/people/server/sign-in-links';
import { publicAction } from '@/lib/server/action';
import { publicMoment } from '@/lib/server/request-facts';

export const askForReset = publicAction(resetRequestSchema, async (input) => requestReset(input, await publicMoment()));
export const choosePassword = publicAction(setPasswordSchema, async (input) => setPasswordByLink(input, await publicMoment()));
