'use server';

import { revalidatePath } from 'next/cache';
import { askSchema, payTeacherSchema } from '@/lib/payroll/schema';
import { agreeToPay, askAboutPay } from '@/lib/payroll/server/check-pay';
import { action } from '@/lib/server/action';

export const agree = action(payTeacherSchema, async (input, context) => {
  await agreeToPay(input, context);
  revalidatePath('/my-hours');
});

export const ask = action(askSchema, async (input, context) => {
  await askAboutPay(input, context);
  revalidatePath('/my-hours');
});
