import { AppError } from '@/lib/errors';
import { importRefSchema } from '@/lib/imports/schema';
import { readUpload } from '@/lib/imports/server/check-import';
import { runImport } from '@/lib/imports/server/run-import';
import { contextOfUser, type SignedIn } from '@/lib/server/user-context';
import type { JobMoment } from './moment';

async function ownerOf({ askedByUserId, db, now }: JobMoment): Promise<SignedIn> {
  const context = askedByUserId ? await contextOfUser(db, askedByUserId, now, 'owner') : null;
  if (!context) throw new AppError('forbidden', 'The account that asked for this is no longer live.');
  return context;
}

/** Reads an uploaded workbook outside the web server: a large one would hold up everybody else's pages. */
export const readImportJob = async (moment: JobMoment): Promise<unknown> => readUpload(importRefSchema.parse(moment.input), await ownerOf(moment));

/** Writes the checked rows, in the name and with the rights of the person who pressed the button. */
export const runImportJob = async (moment: JobMoment): Promise<unknown> => runImport(importRefSchema.parse(moment.input), await ownerOf(moment));
