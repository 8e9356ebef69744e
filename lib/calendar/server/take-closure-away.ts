import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import { deleteClosure, findClosure, seriesRound } from '@/db/closures';
import { termOn } from '@/db/terms';
import { transaction } from '@/db/transaction';
import { AppError, notFound } from '@/lib/errors';
import { formatDate, plural } from '@/lib/format';
import type { Context } from '@/lib/server/context';
import { assertCan } from '@/policies/ability';
import type { closureSchema } from '../term-schema';
import { lessonsByTeacher } from './lessons-by-teacher';

/**
 * A planned closure is taken away while no weekly lesson has been planned round it. Afterwards the day stays closed:
 * the families' lessons and bills were counted without it.
 */
export async function takeClosureAway({ closureId }: z.output<typeof closureSchema>, context: Context): Promise<void> {
  const { locale } = context.school;
  assertCan(context.ability, 'update', 'Term', {});
  await transaction(context.db, async (trx) => {
    const closure = await findClosure(trx, closureId);
    if (!closure) throw notFound('closed day');
    if (closure.kind !== 'planned') throw new AppError('conflict', 'The school closed at short notice that day, and lessons were marked for it. It stays.');
    if ((await termOn(trx, closure.closedOn))?.state === 'closed') throw new AppError('conflict', 'The term of this day is closed. Its days stay as they were.');
    const round = await seriesRound(trx, closure);
    const lessons = round.reduce((sum, each) => sum + each.lessons, 0);
    if (lessons > 0) {
      throw new AppError('conflict', `${plural(lessons, 'weekly lesson was', 'weekly lessons were')} planned round ${formatDate(closure.closedOn, locale, 'day')}: ${lessonsByTeacher(round, locale)}. It stays closed: those lessons and their bills were counted without it.`);
    }
    await deleteClosure(trx, closure.id);
    await recordAudit(trx, context, { action: 'closure', tableName: 'closure', rowId: closure.id, before: closure, sentence: `Teaching again on ${formatDate(closure.closedOn, locale, 'full')}, which was closed: ${closure.reason}.` });
  });
}
