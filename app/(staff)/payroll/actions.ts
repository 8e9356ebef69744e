'use server';

import { revalidatePath } from 'next/cache';
import { answerSchema, buildRunSchema, passOverSchema, payRunSchema, sendForCheckSchema } from '@/lib/payroll/schema';
import { answerPayQuery } from '@/lib/payroll/server/answer-pay-query';
import { passOverTeacher } from '@/lib/payroll/server/check-pay';
import { approvePayRun, closePayRun, sendForCheck } from '@/lib/payroll/server/close-pay-run';
import { buildPayRuns, gatherPayRun } from '@/lib/payroll/server/gather-pay-run';
import { action } from '@/lib/server/action';

const refresh = () => revalidatePath('/payroll', 'layout');

export const build = action(buildRunSchema, async (input, context) => {
  const built = await buildPayRuns(input, context);
  refresh();
  return built;
});
export const gather = action(payRunSchema, async (input, context) => {
  await gatherPayRun(input, context);
  refresh();
});
export const send = action(sendForCheckSchema, async (input, context) => {
  await sendForCheck(input, context);
  refresh();
});
export const approve = action(payRunSchema, async (input, context) => {
  await approvePayRun(input, context);
  refresh();
});
export const close = action(payRunSchema, async (input, context) => {
  await closePayRun(input, context);
  refresh();
});
export const answer = action(answerSchema, async (input, context) => {
  await answerPayQuery(input, context);
  refresh();
});
export const passOver = action(passOverSchema, async (input, context) => {
  await passOverTeacher(input, context);
  refresh();
});
