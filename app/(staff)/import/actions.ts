'use server';

import { revalidatePath } from 'next/cache';
import { checkAgainSchema, importRefSchema, uploadSchema } from '@/lib/imports/schema';
import { checkAgain } from '@/lib/imports/server/check-import';
import { startImport } from '@/lib/imports/server/start-import';
import { undoImport } from '@/lib/imports/server/undo-import';
import { uploadWorkbook } from '@/lib/imports/server/upload-workbook';
import { action } from '@/lib/server/action';

export const chooseWorkbook = action(uploadSchema, async ({ file }, context) =>
  uploadWorkbook({ bytes: Buffer.from(await file.arrayBuffer()), fileName: file.name }, context));

export const checkWorkbookAgain = action(checkAgainSchema, async (input, context) => {
  const control = await checkAgain(input, context);
  revalidatePath(`/import/${input.batchId}`);
  return control;
});

export const bringIn = action(importRefSchema, async (input, context) => {
  const started = await startImport(input, context);
  revalidatePath(`/import/${input.batchId}`);
  return started;
});

export const takeBack = action(importRefSchema, async (input, context) => {
  const undone = await undoImport(input, context);
  revalidatePath('/', 'layout');
  return undone;
});
