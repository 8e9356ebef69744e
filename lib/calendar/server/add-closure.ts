import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import { lessonsWithin, type ClosedSpan } from '@/db/closures';
import type { Trx } from '@/db/connection';
import { allSites } from '@/db/rooms';
import { closuresBetween, insertClosure } from '@/db/terms';
import { transaction } from '@/db/transaction';
import { AppError } from '@/lib/errors';
import { formatDate, plural } from '@/lib/format';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { minuteOfClock } from '@/lib/time';
import { assertCan } from '@/policies/ability';
import { datesBetween } from '../term';
import type { addClosureSchema } from '../term-schema';
import { lessonsByTeacher } from './lessons-by-teacher';

/**
 * Days without teaching that are known beforehand: holidays, a staff day. No lesson is planned on them and none is
 * counted (job map B3). Where lessons are booked already the closure is refused: they would have to be moved or made
 * good first, one by one, with the families knowing.
 */
export async function addClosure(input: z.output<typeof addClosureSchema>, context: Context): Promise<{ days: number }> {
  const { db, school, actor } = context;
  assertCan(context.ability, 'create', 'Term', {});
  const site = input.siteId === '' ? null : (await allSites(db)).find(({ id }) => id === input.siteId);
  if (site === undefined) throw new AppError('invalid', 'This site was not found.', { siteId: ['Choose a site from the list.'] });
  const span = { from: input.from, until: input.until, siteId: site?.id ?? null, fromMin: minuteOfClock(input.fromTime), toMin: minuteOfClock(input.toTime) };
  const { from, until, ...each } = span;
  const dates = datesBetween(from, until);
  await transaction(db, async (trx) => {
    await assertNotClosed(trx, span, school.locale);
    await assertNothingBooked(trx, span, school.locale);
    const ids = dates.map(() => newId());
    for (const [index, closedOn] of dates.entries()) await insertClosure(trx, { id: ids[index] ?? newId(), closedOn, ...each, kind: 'planned', reason: input.reason, declaredBy: actor.personId });
    const days = from === until ? formatDate(from, school.locale, 'full') : `${formatDate(from, school.locale, 'full')} to ${formatDate(until, school.locale, 'full')}`;
    await recordAudit(trx, context, { action: 'closure', tableName: 'closure', rowId: ids[0] ?? '', after: span, sentence: `No teaching at ${site?.name ?? 'every site'}, ${days}: ${input.reason}.` });
  });
  return { days: dates.length };
}

async function assertNotClosed(trx: Trx, { from, until, siteId, fromMin, toMin }: ClosedSpan, locale: string): Promise<void> {
  const covers = (closure: Pick<ClosedSpan, 'siteId' | 'fromMin' | 'toMin'>) =>
    (closure.siteId === null || siteId === null || closure.siteId === siteId)
    && (closure.fromMin === null || closure.toMin === null || fromMin === null || toMin === null || (closure.fromMin < toMin && fromMin < closure.toMin));
  const known = (await closuresBetween(trx, from, until)).find(covers);
  if (known) throw new AppError('conflict', `${formatDate(known.closedOn, locale, 'day')} is closed already: ${known.reason}. Take that away first, or leave the day out.`, { from: ['Closed already.'] });
}

async function assertNothingBooked(trx: Trx, span: ClosedSpan, locale: string): Promise<void> {
  const booked = await lessonsWithin(trx, span);
  const lessons = booked.reduce((sum, each) => sum + each.lessons, 0);
  if (lessons === 0) return;
  const when = span.from === span.until ? `on ${formatDate(span.from, locale, 'day')}` : 'on these days';
  throw new AppError('conflict', `${plural(lessons, 'lesson is', 'lessons are')} booked ${when}: ${lessonsByTeacher(booked, locale)}. Move or cancel them first; then the school can close.`, { from: ['Lessons are booked.'] });
}
