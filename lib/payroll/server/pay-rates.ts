import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import type { Db } from '@/db/connection';
import { taughtLessonTypes, type LessonType } from '@/db/lesson-types';
import { allPayRates, beginPayRate, isRateOverlap, paidEngagements, payClosedUntil, rateHistory, type PaidEngagement, type RateLine } from '@/db/pay-rates';
import { transaction } from '@/db/transaction';
import { AppError, notFound } from '@/lib/errors';
import { formatDate, formatMoney } from '@/lib/format';
import { isAmbiguousAmount, parseMoney } from '@/lib/money';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { assertCan } from '@/policies/ability';
import type { beginRateSchema } from '../rate-schema';
import { rateWords } from '../rate-words';
import { WORK_OF_LESSON } from '../rates';

type NewRate = z.output<typeof beginRateSchema>;
export type TeacherRates = PaidEngagement & { rates: RateLine[] };
export type RateBook = { teachers: TeacherRates[]; lessonTypes: { id: string; label: string; code: string }[] };

/** Each teacher's rates with their days, and the kinds of lesson a rate may be narrowed to. */
export async function readRates({ db, ability }: Context): Promise<RateBook> {
  assertCan(ability, 'read', 'Rate', {});
  const rates = await rateHistory(db);
  return {
    teachers: (await paidEngagements(db)).map((engagement) => ({ ...engagement, rates: rates.filter(({ engagementId }) => engagementId === engagement.engagementId) })),
    lessonTypes: (await taughtLessonTypes(db)).filter(({ code }) => code in WORK_OF_LESSON).map(({ id, label, code }) => ({ id, label, code })),
  };
}

/**
 * A teacher is paid a new rate from a day on; lessons before it keep the rate of their day. What has been closed stays
 * closed: a rate does not begin on a day whose pay is settled. Nobody but the owner sets it.
 */
export async function beginRate(input: NewRate, context: Context): Promise<void> {
  const { db, school, actor } = context;
  assertCan(context.ability, 'create', 'Rate', {});
  const engagement = (await paidEngagements(db)).find(({ engagementId }) => engagementId === input.engagementId);
  if (!engagement) throw notFound('teacher');
  if (isAmbiguousAmount(input.amount, engagement.currency)) throw new AppError('invalid', 'The amount can be read in two ways.', { amount: ['Write it with its cents, like 21.00 or 21.50.'] });
  const amountMinor = parseMoney(input.amount, engagement.currency);
  if (amountMinor === null || amountMinor < 0) throw new AppError('invalid', 'The amount was not understood.', { amount: ['Write it like 21 or 21.50.'] });
  const { amount: _typed, ...facts } = input;
  const lessonType = await lessonTypeOf(db, input);
  const rate = { ...facts, id: newId(), siteId: null, amountMinor, validTo: null };
  const written = transaction(db, async (trx) => {
    const closedUntil = await payClosedUntil(trx, input.engagementId);
    if (closedUntil !== null && input.validFrom <= closedUntil) throw closedRefusal(closedUntil, school.locale);
    await beginPayRate(trx, { ...rate, approvedBy: actor.personId });
    const what = rateWords({ ...rate, lessonTypeLabel: lessonType?.label ?? null, siteName: null });
    await recordAudit(trx, context, { action: 'rate', tableName: 'pay_rate', rowId: rate.id, after: rate, sentence: `${engagement.name}, ${what}: ${formatMoney({ amountMinor, currency: engagement.currency }, school.locale)} from ${formatDate(input.validFrom, school.locale, 'full')}.` });
  });
  await written.catch(async (error: unknown) => { throw isRateOverlap(error) ? await overlapRefusal(rate, context) : error; });
}

async function lessonTypeOf(db: Db, { lessonTypeId, workType }: NewRate): Promise<LessonType | null> {
  if (lessonTypeId === null) return null;
  const type = (await taughtLessonTypes(db)).find(({ id }) => id === lessonTypeId);
  if (!type || WORK_OF_LESSON[type.code] !== workType) throw new AppError('invalid', 'This lesson type does not go with what is paid.', { lessonTypeId: ['Choose a lesson type from the list.'] });
  return type;
}

const closedRefusal = (closedUntil: string, locale: string) =>
  new AppError('conflict', `Pay up to ${formatDate(closedUntil, locale, 'full')} is closed and stays as it is. Choose a later day; what is still owed for before goes into the next run as the answer to a question.`, { validFrom: ['Choose a later day.'] });

async function overlapRefusal(rate: Omit<NewRate, 'amount'>, { db, school }: Context): Promise<AppError> {
  const keys = ['engagementId', 'workType', 'lessonTypeId', 'lengthMinutes', 'seatsFrom', 'seatsTo'] as const;
  const others = (await allPayRates(db)).filter((row) => row.siteId === null && keys.every((key) => row[key] === rate[key]) && (row.validTo === null || row.validTo > rate.validFrom));
  const other = others.sort((a, b) => b.validFrom.localeCompare(a.validFrom))[0];
  const since = other ? ` from ${formatDate(other.validFrom, school.locale, 'full')}` : '';
  return new AppError('conflict', `There is a rate for exactly this${since} already, and two cannot hold on one day. Choose a later day.`, { validFrom: ['Choose a later day.'] });
}
