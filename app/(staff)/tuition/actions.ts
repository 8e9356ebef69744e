'use server';

import { revalidatePath } from 'next/cache';
import * as z from 'zod';
import { action } from '@/lib/server/action';
import { deskPaymentSchema, holdFamilySchema, previewRunSchema, releaseRunSchema, unholdFamilySchema } from '@/lib/tuition/schema';
import { askForRelease } from '@/lib/tuition/server/ask-for-release';
import { holdFamily, unholdFamily } from '@/lib/tuition/server/hold-family';
import { previewTuitionRun } from '@/lib/tuition/server/preview-tuition-run';
import { previewDeskPayment, takeDeskPayment } from '@/lib/tuition/server/take-desk-payment';

export const previewRun = action(previewRunSchema, async (input, context) => {
  const run = await previewTuitionRun(input, context);
  revalidatePath('/tuition', 'layout');
  return run;
});

export const hold = action(holdFamilySchema, async (input, context) => {
  await holdFamily(input, context);
  revalidatePath('/tuition', 'layout');
});

export const unhold = action(unholdFamilySchema, async (input, context) => {
  await unholdFamily(input, context);
  revalidatePath('/tuition', 'layout');
});

export const release = action(releaseRunSchema, askForRelease);

export const previewPayment = action(z.object({ payerId: z.string().min(1).max(64), amount: z.string().max(20) }), previewDeskPayment);

export const takePayment = action(deskPaymentSchema, async (input, context) => {
  const taken = await takeDeskPayment(input, context);
  revalidatePath('/tuition', 'layout');
  return taken;
});
