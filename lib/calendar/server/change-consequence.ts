import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import type { Trx } from '@/db/connection';
import { datedConsequences, setHouseRule, type ConsequenceVersion } from '@/db/settings';
import { transaction } from '@/db/transaction';
import { AppError } from '@/lib/errors';
import { formatDate } from '@/lib/format';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { assertCan } from '@/policies/ability';
import { ATTENDANCE_WORDS, isTaught } from '../attendance';
import { consequenceWords } from '../consequence-words';
import type { changeConsequenceSchema } from '../consequence-schema';
import { consequencesOn } from '../consequences';

type Change = z.output<typeof changeConsequenceSchema>;

export async function readConsequences({ db, ability }: Context): Promise<ConsequenceVersion[]> {
  assertCan(ability, 'read', 'Settings', {});
  return datedConsequences(db);
}

/**
 * From a day on a mark means something else. Lessons before that day keep the table of their own day, in credit, tuition
 * and pay; a table that is planned for a later day takes the change over.
 */
export async function changeConsequence(change: Change, context: Context): Promise<void> {
  const { db, today, school } = context;
  assertCan(context.ability, 'update', 'Settings', {});
  const { mark, consequence, validFrom } = change;
  // Today's lessons may be marked and credited already; the table of their day stays.
  if (validFrom <= today) throw new AppError('invalid', 'It changes from tomorrow on or later: lessons of today may be marked already.', { validFrom: ['Choose a day after today.'] });
  if (isTaught(mark) && consequence.credit !== 'none') throw new AppError('invalid', `A lesson that was taught (“${ATTENDANCE_WORDS[mark]}”) gives no make-up credit: nothing was missed.`, { credit: ['Choose no credit.'] });
  await transaction(db, async (trx) => {
    const before = await datedConsequences(trx);
    await setFrom(trx, change, before, context);
    await recordAudit(trx, context, {
      action: 'rule', tableName: 'setting_version', rowId: 'attendance.consequences', before: consequencesOn(before, validFrom)[mark], after: { mark, consequence, validFrom },
      sentence: `From ${formatDate(validFrom, school.locale, 'full')}, ${ATTENDANCE_WORDS[mark]}: ${consequenceWords(consequence)}.`,
    });
  });
}

async function setFrom(trx: Trx, { mark, consequence, validFrom }: Change, before: readonly ConsequenceVersion[], { actor }: Context): Promise<void> {
  const later = before.map((version) => version.validFrom).filter((day) => day > validFrom);
  for (const day of [validFrom, ...later]) {
    await setHouseRule(trx, { id: newId(), key: 'attendance.consequences', value: { ...consequencesOn(before, day), [mark]: consequence }, validFrom: day, approvedBy: actor.personId });
  }
}
