import 'server-only';
import { recordAudit } from '@/db/audit';
import { installFirstLadder } from '@/db/ladder-install';
import { allSubjects } from '@/db/lesson-types';
import { transaction } from '@/db/transaction';
import { AppError } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { assertCan } from '@/policies/ability';
import { FIRST_EDITION } from '../first-edition/edition';

/** Gives the school the ladder that ships. Pressed twice it changes nothing. */
export async function installLadder(_input: object, context: Context): Promise<{ editionId: string; isNew: boolean }> {
  assertCan(context.ability, 'create', 'Ladder', {});
  return transaction(context.db, async (trx) => {
    const [subject] = await allSubjects(trx);
    if (!subject) throw new AppError('conflict', 'Add a subject first: a ladder belongs to one.');
    const installed = await installFirstLadder(trx, { subjectId: subject.id, startsOn: context.today, createdBy: context.actor.personId, newId });
    if (installed.isNew) {
      await recordAudit(trx, context, { action: 'install', tableName: 'ladder_edition', rowId: installed.editionId, sentence: `Installed the ladder “${FIRST_EDITION.ladderName}”, ${FIRST_EDITION.label.toLowerCase()}.` });
    }
    return installed;
  });
}
