import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import type { Trx } from '@/db/connection';
import { addEnquiryEvent, changeEnquiry, findEnquiry } from '@/db/enquiries';
import { insertHolds, releaseHolds } from '@/db/holds';
import { lessonTypeByCode } from '@/db/lesson-types';
import { findOffer, insertOffer, lapsedOffers, setOfferState } from '@/db/opening-offers';
import { allSites, findRoom } from '@/db/rooms';
import { transaction } from '@/db/transaction';
import { AppError, notFound } from '@/lib/errors';
import { formatDate, formatTimeRange } from '@/lib/format';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import type { EpochSeconds } from '@/lib/time';
import { assertCan } from '@/policies/ability';
import { spanOf } from '../lesson-time';
import type { holdOpeningSchema } from '../schema';
import { clashesWith } from './booking-rules';

/** An offered opening is kept this long for the caller. */
export const HOLD_HOURS = 48;

/** Keeps an opening for an enquiry: until it lapses nobody else can take the teacher or the room at that time. */
export async function holdOpening(input: z.output<typeof holdOpeningSchema>, context: Context): Promise<{ offerId: string; heldUntil: EpochSeconds }> {
  const { db, now, school } = context;
  const enquiry = await findEnquiry(db, input.enquiryId);
  if (!enquiry) throw notFound('enquiry');
  assertCan(context.ability, 'update', 'Enquiry', enquiry);
  const site = (await allSites(db)).find(({ id }) => id === input.siteId);
  const room = await findRoom(db, input.roomId);
  if (!site || !room) throw notFound('room');
  const offer = { ...input, id: newId(), studentId: enquiry.studentId, zone: site.zone, heldUntil: now + HOLD_HOURS * 3600, state: 'held' as const, createdBy: context.actor.personId };
  const lessonType = await lessonTypeByCode(db, 'trial');
  const when = `${formatDate(input.localDate, school.locale, 'short')}, ${formatTimeRange(input.startMin, input.lengthMinutes)}`;
  await transaction(db, async (trx) => {
    const wish = { ...offer, lessonType, level: enquiry.levelGuess, title: '', studentIds: [], mode: 'in_room' as const };
    const hard = (await clashesWith(trx, wish)).filter(({ isHard }) => isHard);
    if (hard.length > 0) throw new AppError('conflict', hard.map(({ sentence }) => sentence).join(' '));
    await insertOffer(trx, offer);
    const span = spanOf(wish);
    await insertHolds(trx, [
      { holderKind: 'teacher', holderId: input.teacherId, ...span },
      { holderKind: 'room', holderId: input.roomId, startsAt: span.startsAt, endsAt: span.endsAt + room.turnoverMin * 60 },
    ], { openingOfferId: offer.id });
    await changeEnquiry(trx, enquiry.id, { state: 'slot_offered' });
    await addEnquiryEvent(trx, { id: newId(), enquiryId: enquiry.id, at: now, kind: 'held', text: `Held ${when}, ${room.name}, for ${HOLD_HOURS} hours.`, byId: context.actor.personId });
    await recordAudit(trx, context, { action: 'hold', tableName: 'opening_offer', rowId: offer.id, sentence: `Held ${when} in ${room.name} for ${enquiry.studentName}.` });
  });
  return { offerId: offer.id, heldUntil: offer.heldUntil };
}

/** Gives a held opening back before its time. */
export async function releaseOpening({ offerId }: { offerId: string }, context: Context): Promise<void> {
  const offer = await findOffer(context.db, offerId);
  if (!offer || offer.state !== 'held') throw notFound('held opening');
  assertCan(context.ability, 'update', 'Enquiry', {});
  await transaction(context.db, async (trx) => {
    await endOffer(trx, offer.id, 'withdrawn');
    await recordAudit(trx, context, { action: 'release', tableName: 'opening_offer', rowId: offer.id, sentence: 'Gave a held opening back.' });
  });
}

export async function endOffer(trx: Trx, offerId: string, state: 'accepted' | 'lapsed' | 'withdrawn'): Promise<void> {
  await releaseHolds(trx, { openingOfferId: offerId });
  await setOfferState(trx, offerId, state);
}

/** Run by the worker: openings whose time has passed are free again, and the enquiry asks for its next step. */
export async function lapseOpenings({ db, now, today }: Pick<Context, 'db' | 'now' | 'today'>): Promise<number> {
  const offers = await lapsedOffers(db, now);
  for (const offer of offers) {
    await transaction(db, async (trx) => {
      await endOffer(trx, offer.id, 'lapsed');
      if (!offer.enquiryId) return;
      await changeEnquiry(trx, offer.enquiryId, { state: 'answered', nextStepOn: today });
      await addEnquiryEvent(trx, { id: newId(), enquiryId: offer.enquiryId, at: now, kind: 'lapsed', text: 'The held opening lapsed.', byId: null });
    });
  }
  return offers.length;
}
