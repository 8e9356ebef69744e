import 'server-only';
import { recordAudit } from '@/db/audit';
import type { Trx } from '@/db/connection';
import { addEnquiryEvent, changeEnquiry, findEnquiry, insertTrial, type Enquiry } from '@/db/enquiries';
import { lessonTypeByCode } from '@/db/lesson-types';
import { findOccurrence } from '@/db/occurrences';
import { findOffer, offersOfEnquiry, type OpeningOffer } from '@/db/opening-offers';
import { insertContact, insertPerson, insertRelationship } from '@/db/people';
import { houseRulesOn } from '@/db/settings';
import { transaction } from '@/db/transaction';
import { AppError, notFound } from '@/lib/errors';
import { formatDate, formatMoney, formatTimeRange } from '@/lib/format';
import { queueMail } from '@/lib/messages/server/queue-mail';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { addDays } from '@/lib/time';
import { assertCan } from '@/policies/ability';
import { calendarFile } from '../calendar-file';
import { splitName } from '../../people/names';
import { endOffer } from './hold-opening';
import { placeBooking } from './place-booking';

/**
 * Turns a held opening into a booked trial lesson: the child and the guardian become people of the school, the
 * hold becomes a lesson, other openings held for the enquiry are given back, and a mail with the date for the
 * family's own calendar goes out. Lifecycle 2.1, "accept for trial".
 */
export async function bookTrial({ offerId }: { offerId: string }, context: Context): Promise<{ occurrenceId: string; studentId: string }> {
  const { db, today } = context;
  const offer = await findOffer(db, offerId);
  if (!offer?.enquiryId) throw notFound('held opening');
  const enquiry = await findEnquiry(db, offer.enquiryId);
  if (!enquiry) throw notFound('enquiry');
  assertCan(context.ability, 'update', 'Enquiry', enquiry);
  if (offer.state !== 'held') throw new AppError('conflict', 'This opening is no longer held. Look for openings again.');
  const rules = await houseRulesOn(db, today);
  const lessonType = await lessonTypeByCode(db, 'trial');
  return transaction(db, async (trx) => {
    const studentId = enquiry.studentId ?? (await admitStudent(trx, enquiry));
    for (const held of await offersOfEnquiry(trx, enquiry.id)) await endOffer(trx, held.id, held.id === offer.id ? 'accepted' : 'withdrawn');
    const { id } = await placeBooking(trx, context, {
      ...offer, lessonType, level: enquiry.levelGuess, title: '', studentIds: [studentId], mode: 'in_room', source: 'trial',
    });
    await insertTrial(trx, {
      id: newId(), enquiryId: enquiry.id, occurrenceId: id, studentId, feeMinor: rules['trial.fee_minor'],
      creditUntilOn: addDays(offer.localDate, rules['trial.credit_days']),
    });
    await tellFamily(trx, context, { enquiry, offer, occurrenceId: id, feeMinor: rules['trial.fee_minor'] });
    return { occurrenceId: id, studentId };
  });
}

/** A child needs a guardian; an adult is both at once. */
async function admitStudent(trx: Trx, enquiry: Enquiry): Promise<string> {
  const studentId = newId();
  await insertPerson(trx, { id: studentId, ...splitName(enquiry.studentName), isStudent: true });
  const contactId = enquiry.isAdult ? studentId : (enquiry.contactPersonId ?? newId());
  if (!enquiry.isAdult) {
    if (!enquiry.contactPersonId) await insertPerson(trx, { id: contactId, ...splitName(enquiry.contactName) });
    await insertRelationship(trx, { id: newId(), childId: studentId, adultId: contactId });
  }
  if (enquiry.contactEmail) await insertContact(trx, { id: newId(), personId: contactId, kind: 'email', value: enquiry.contactEmail });
  if (enquiry.contactPhone) await insertContact(trx, { id: newId(), personId: contactId, kind: 'phone', value: enquiry.contactPhone });
  await changeEnquiry(trx, enquiry.id, { studentId, contactPersonId: contactId });
  return studentId;
}

type Booked = { enquiry: Enquiry; offer: OpeningOffer; occurrenceId: string; feeMinor: number };

async function tellFamily(trx: Trx, context: Context, { enquiry, offer, occurrenceId, feeMinor }: Booked): Promise<void> {
  const { now, school, actor } = context;
  const lesson = await findOccurrence(trx, occurrenceId);
  if (!lesson) throw notFound('lesson');
  const when = `${formatDate(offer.localDate, school.locale, 'day')}, ${formatTimeRange(offer.startMin, offer.lengthMinutes)}`;
  const where = `${lesson.roomName ?? ''}, ${lesson.siteName}`;
  await changeEnquiry(trx, enquiry.id, { state: 'trial_booked', nextStepOn: offer.localDate });
  await addEnquiryEvent(trx, { id: newId(), enquiryId: enquiry.id, at: now, kind: 'trial_booked', text: `Trial booked: ${when}, ${where}, with ${lesson.teacherName ?? ''}.`, byId: actor.personId });
  await recordAudit(trx, context, { action: 'book', tableName: 'occurrence', rowId: occurrenceId, sentence: `Booked a trial for ${enquiry.studentName}: ${when}, ${where}.` });
  if (!enquiry.contactEmail) return;
  const description = `Trial lesson at ${school.name}`;
  await queueMail(trx, context, { name: enquiry.contactName, address: enquiry.contactEmail }, {
    topic: 'trial', key: `trial:${occurrenceId}:booked`, subjectRef: occurrenceId, subject: `Your trial lesson at ${school.name}`,
    lines: [
      `The trial lesson for ${enquiry.studentName} is booked: ${when}, ${where}, with ${lesson.teacherName ?? 'one of our teachers'}.`,
      ...(feeMinor > 0 ? [`The trial costs ${formatMoney({ amountMinor: feeMinor, currency: school.currency }, school.locale)}; enrol soon afterwards and it comes off your first bill.`] : []),
      'The attached file puts the date into your own calendar. Nothing has to be brought along.',
    ],
    attachments: [{
      filename: 'trial-lesson.ics', contentType: 'text/calendar; charset=utf-8; method=PUBLISH',
      content: calendarFile({ uid: `${occurrenceId}@rungwell`, startsAt: lesson.startsAt, endsAt: lesson.endsAt, summary: description, location: where, description }, now),
    }],
  });
}
