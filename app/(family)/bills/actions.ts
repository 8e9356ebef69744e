'use server';

import { revalidatePath } from 'next/cache';
import { action } from '@/lib/server/action';
import { attemptSchema, startPaymentSchema } from '@/lib/tuition/schema';
import { askAboutCardPayment } from '@/lib/tuition/server/receive-card-event';
import { startCardPayment } from '@/lib/tuition/server/start-card-payment';

export const startPayment = action(startPaymentSchema, (input, context) => startCardPayment(input, context));

export const askProcessor = action(attemptSchema, async (input, context) => {
  await askAboutCardPayment(input, context);
  revalidatePath('/bills');
});
