import 'server-only';
import { insertAccount, grantRole } from '@/db/accounts';
import type { Db, Trx } from '@/db/connection';
import { insertLessonTypes, insertSubject } from '@/db/lesson-types';
import { insertContact, insertPerson } from '@/db/people';
import { insertProduct } from '@/db/prices';
import { ensureFeature, insertLegalEntity, insertOpeningSpans, insertSite } from '@/db/rooms';
import { findSchool, insertSchool } from '@/db/school';
import { recordAudit } from '@/db/audit';
import { transaction } from '@/db/transaction';
import { FIRST_FEATURES, FIRST_LESSON_TYPES, FIRST_SUBJECT } from '@/lib/calendar/foundation';
import { AppError } from '@/lib/errors';
import { newId } from '@/lib/server/ids';
import { hashPassword } from '@/lib/server/passwords';
import type { EpochSeconds } from '@/lib/time';
import type * as z from 'zod';
import { splitName } from '../names';
import type { setUpSchema } from '../schema';

type Moment = { db: Db; now: EpochSeconds };
type SetUp = z.output<typeof setUpSchema>;
export type Opened = { userId: string; ownerId: string; siteId: string; subjectId: string; legalEntityId: string };

/**
 * Opens a new school: its name, zone and currency, one site, the kinds of lessons, and the first owner who can sign
 * in at once. Possible once: a second time it refuses.
 */
export async function openSchool(input: SetUp, { db, now }: Moment): Promise<Opened> {
  const passwordHash = await hashPassword(input.password);
  return transaction(db, async (trx) => {
    if (await findSchool(trx)) throw new AppError('conflict', 'This school has been set up already. Sign in instead.');
    await insertSchool(trx, { name: input.schoolName, locale: input.locale, zone: input.zone, currency: input.currency });
    const place = await layFoundation(trx, input);
    const [ownerId, userId] = [newId(), newId()];
    await insertPerson(trx, { id: ownerId, ...splitName(input.ownerName) });
    await insertContact(trx, { id: newId(), personId: ownerId, kind: 'email', value: input.ownerEmail.toLowerCase() });
    await insertAccount(trx, { id: userId, personId: ownerId, email: input.ownerEmail, passwordHash, state: 'live' });
    await grantRole(trx, { id: newId(), userId, role: 'owner' });
    await recordAudit(trx, { actor: { personId: ownerId, role: 'owner' }, now }, { action: 'open', tableName: 'school', rowId: '1', sentence: `Opened ${input.schoolName}.` });
    return { userId, ownerId, ...place };
  });
}

/** What is charged for. Prices and the treatment of tax are the owner's to set: nothing is guessed, and nothing is billed before. */
async function layProducts(trx: Trx, types: readonly { id: string; code: string }[]): Promise<void> {
  const typeOf = (code: string) => types.find((type) => type.code === code)?.id ?? null;
  const products = [
    { code: 'lesson', label: 'Lesson', kind: 'tuition', lessonTypeId: typeOf('single'), accountCode: 'tuition_income' },
    { code: 'class', label: 'Class', kind: 'tuition', lessonTypeId: typeOf('group'), accountCode: 'tuition_income' },
    { code: 'registration', label: 'Registration', kind: 'registration', lessonTypeId: null, accountCode: 'fee_income' },
    { code: 'trial', label: 'Trial lesson', kind: 'trial', lessonTypeId: null, accountCode: 'fee_income' },
  ] as const;
  for (const product of products) await insertProduct(trx, { id: newId(), taxClass: 'tuition', ...product });
}

const WEEKDAYS_OPEN = [1, 2, 3, 4, 5, 6];

async function layFoundation(trx: Trx, input: SetUp): Promise<{ siteId: string; subjectId: string; legalEntityId: string }> {
  const [legalEntityId, siteId, subjectId] = [newId(), newId(), newId()];
  await insertLegalEntity(trx, { id: legalEntityId, name: input.schoolName, country: input.country, currency: input.currency });
  await insertSite(trx, { id: siteId, legalEntityId, name: input.siteName, zone: input.zone, orderNo: 1 });
  await insertOpeningSpans(trx, WEEKDAYS_OPEN.map((weekday) => ({ id: newId(), siteId, weekday, fromMin: 9 * 60, toMin: 21 * 60 })));
  const types = FIRST_LESSON_TYPES.map((type) => ({ id: newId(), ...type }));
  await insertLessonTypes(trx, types);
  await insertSubject(trx, { id: subjectId, ...FIRST_SUBJECT });
  await layProducts(trx, types);
  for (const feature of FIRST_FEATURES) await ensureFeature(trx, { id: newId(), ...feature });
  return { siteId, subjectId, legalEntityId };
}
