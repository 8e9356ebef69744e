import 'server-only';
import type * as z from 'zod';
import type { Db } from '@/db/connection';
import { addEnquiryEvent, insertEnquiry } from '@/db/enquiries';
import { allSubjects } from '@/db/lesson-types';
import { findSchool } from '@/db/school';
import { transaction } from '@/db/transaction';
import { failuresOf, noteFailure } from '@/db/sign-in-attempts';
import { AppError } from '@/lib/errors';
import { queueMail } from '@/lib/messages/server/queue-mail';
import { newId } from '@/lib/server/ids';
import { addDays, localDateOf, type EpochSeconds } from '@/lib/time';
import type { enquirySchema } from '../schema';

type Moment = { db: Db; now: EpochSeconds; address: string };
/** Enquiries from one network address in a quarter of an hour. */
const ADDRESS_LIMIT = 8;

/**
 * A stranger asks for a trial lesson. The desk sees it at once and answers within a working day; the stranger
 * gets a mail that says so. A form filled in by a program is thanked and dropped.
 */
export async function receiveEnquiry(input: z.output<typeof enquirySchema>, { db, now, address }: Moment): Promise<{ received: true }> {
  const school = await findSchool(db);
  if (!school) throw new AppError('conflict', 'The school has not opened yet.');
  if (input.website !== '') return { received: true };
  const key = `enquiry:${address}`;
  if ((await failuresOf(db, key, now)).inWindow >= ADDRESS_LIMIT) {
    throw new AppError('too_many', 'That was a lot of enquiries from one place. Please telephone, or try again in a quarter of an hour.');
  }
  await noteFailure(db, key, now);
  const id = newId();
  const subjects = await allSubjects(db);
  const { mayWrite: _mayWrite, website: _website, contactPhone, ...wish } = input;
  await transaction(db, async (trx) => {
    await insertEnquiry(trx, {
      ...wish, id, contactEmail: wish.contactEmail.toLowerCase(), contactPhone: contactPhone === '' ? null : contactPhone, source: 'web', levelGuess: 1,
      subjectId: subjects[0]?.id ?? null, state: 'new', nextStepOn: addDays(localDateOf(now, school.zone), 1), createdAt: now,
    });
    await addEnquiryEvent(trx, { id: newId(), enquiryId: id, at: now, kind: 'received', text: 'Came in through the school’s own page.', byId: null });
    await queueMail(trx, { now, school }, { name: input.contactName, address: input.contactEmail }, {
      topic: 'enquiry', key: `enquiry:${id}:received`, subjectRef: id, subject: `Your enquiry at ${school.name}`,
      lines: [
        `Thank you for asking about a trial lesson for ${input.studentName}.`,
        'We will answer within one working day with two times that are really free.',
        ...(school.publicPhone ? [`If you would rather talk, ring us on ${school.publicPhone}.`] : []),
      ],
    });
  });
  return { received: true };
}
