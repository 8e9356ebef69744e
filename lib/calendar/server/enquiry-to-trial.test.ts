import ICAL from 'ical.js';
import { describe, expect, it } from 'vitest';
import type { Context } from '@/lib/server/context';
import { lanternStreet } from '@/tests/factories/lantern-street';
import { contextOf } from '@/tests/support/context';
import { freshDb } from '@/tests/support/fresh-db';
import { bookTrial } from './book-trial';
import { findOpeningsFor } from './find-openings-for';
import { holdOpening, lapseOpenings, releaseOpening } from './hold-opening';
import { receiveEnquiry } from './receive-enquiry';

const NOW = Date.UTC(2026, 8, 14, 13) / 1000;
const ENQUIRY = {
  contactName: 'Marta Adair', contactEmail: 'Marta@Example.com', contactPhone: '0155 010 0142', studentName: 'Wren Adair', isAdult: false, studentAge: 9,
  experience: '', wishes: [{ weekday: 2, fromMin: 930, toMin: 1110 }], siteId: 'quay', lengthMinutes: 30, message: 'Plays by ear.', mayWrite: true as const, website: '',
};
const SEARCH = {
  subjectId: 'keyboard', level: 1, lengthMinutes: 30, isWeekly: false, fromDate: '2026-09-14', untilDate: '2026-09-25',
  windows: ENQUIRY.wishes, siteId: 'quay', features: [],
};

async function deskWithEnquiry(): Promise<{ context: Context; enquiryId: string }> {
  const db = freshDb();
  await lanternStreet(db);
  const context = contextOf(db, 'desk', { personId: 'pat', now: NOW, school: { zone: 'America/New_York', currency: 'USD', locale: 'en-US' } });
  await receiveEnquiry(ENQUIRY, { db, now: NOW, address: '10.0.0.1' });
  const row: { id: string } | undefined = await db('enquiry').first('id');
  return { context, enquiryId: row?.id ?? '' };
}

const holdFirst = async (context: Context, enquiryId: string) => {
  const { openings } = await findOpeningsFor(SEARCH, context);
  const [opening] = openings;
  if (!opening) throw new Error('no opening was found');
  const place = { teacherId: opening.teacherId, roomId: opening.roomId, siteId: opening.siteId, localDate: opening.localDate, startMin: opening.startMin, lengthMinutes: 30 };
  return { place, held: await holdOpening({ ...place, enquiryId, subjectId: 'keyboard', isWeekly: false }, context) };
};

describe('an enquiry', () => {
  it('reaches the desk and thanks the stranger once', async () => {
    const { context } = await deskWithEnquiry();
    expect(await context.db('enquiry')).toMatchObject([{ state: 'new', contactEmail: 'marta@example.com', nextStepOn: '2026-09-15' }]);
    expect(await context.db('outbox')).toMatchObject([{ topic: 'enquiry', toAddress: 'Marta@Example.com' }]);
  });

  it('from a program that fills every field is thanked and dropped', async () => {
    const { context } = await deskWithEnquiry();
    await receiveEnquiry({ ...ENQUIRY, website: 'http://example.com' }, { db: context.db, now: NOW, address: '10.0.0.2' });
    expect(await context.db('enquiry')).toHaveLength(1);
  });

  it('in great numbers from one place is refused with a sentence', async () => {
    const { context } = await deskWithEnquiry();
    const again = () => receiveEnquiry(ENQUIRY, { db: context.db, now: NOW, address: '10.0.0.1' });
    for (let index = 0; index < 7; index += 1) await again();
    await expect(again()).rejects.toMatchObject({ code: 'too_many' });
  });
});

describe('a held opening', () => {
  it('is inside the wishes and is nobody else’s until it lapses', async () => {
    const { context, enquiryId } = await deskWithEnquiry();
    const { place } = await holdFirst(context, enquiryId);
    expect(place).toMatchObject({ localDate: '2026-09-15', siteId: 'quay' });
    expect(place.startMin).toBeGreaterThanOrEqual(930);
    await expect(holdOpening({ ...place, enquiryId, subjectId: 'keyboard', isWeekly: false }, context)).rejects.toMatchObject({
      code: 'conflict', message: expect.stringContaining('the opening held for Wren Adair') as string,
    });
    expect(await lapseOpenings({ ...context, now: NOW + 48 * 3600 - 1 })).toBe(0);
    expect(await lapseOpenings({ ...context, now: NOW + 48 * 3600 })).toBe(1);
    expect(await context.db('hold')).toHaveLength(0);
    await expect(holdOpening({ ...place, enquiryId, subjectId: 'keyboard', isWeekly: false }, context)).resolves.toBeDefined();
  });

  it('can be given back at once', async () => {
    const { context, enquiryId } = await deskWithEnquiry();
    const { held } = await holdFirst(context, enquiryId);
    await releaseOpening({ offerId: held.offerId }, context);
    expect(await context.db('hold')).toHaveLength(0);
    await expect(bookTrial({ offerId: held.offerId }, context)).rejects.toMatchObject({ code: 'conflict' });
  });

  it('is not for guardians or strangers to the desk', async () => {
    const { context, enquiryId } = await deskWithEnquiry();
    const { place } = await holdFirst(context, enquiryId);
    for (const role of ['guardian', 'student', 'teacher'] as const) {
      const other = contextOf(context.db, role);
      await expect(findOpeningsFor(SEARCH, other)).rejects.toMatchObject({ code: 'not_found' });
      await expect(holdOpening({ ...place, enquiryId, subjectId: 'keyboard', isWeekly: false }, other)).rejects.toMatchObject({ code: 'not_found' });
    }
  });
});

describe('booking the trial', () => {
  it('admits the child with a guardian, swaps the hold for a lesson and mails the date', async () => {
    const { context, enquiryId } = await deskWithEnquiry();
    const { place, held } = await holdFirst(context, enquiryId);
    const { occurrenceId, studentId } = await bookTrial({ offerId: held.offerId }, context);
    expect(await context.db('occurrence')).toMatchObject([{ id: occurrenceId, localDate: place.localDate, startMin: place.startMin, plannedTeacherId: place.teacherId }]);
    expect(await context.db('relationship')).toMatchObject([{ childId: studentId }]);
    expect(await context.db('trial')).toMatchObject([{ feeMinor: 2500, creditUntilOn: '2026-09-29' }]);
    expect(await context.db('hold').whereNotNull('openingOfferId')).toHaveLength(0);
    const mail: { attachmentsJson: string; subject: string } | undefined = await context.db('outbox').where({ topic: 'trial' }).first();
    const [file] = JSON.parse(mail?.attachmentsJson ?? '[]') as { content: string; filename: string }[];
    const event = new ICAL.Component(ICAL.parse(file?.content ?? '') as string).getFirstSubcomponent('vevent');
    const row: { startsAt: number } | undefined = await context.db('occurrence').first('startsAt');
    expect((event?.getFirstPropertyValue('dtstart') as ICAL.Time).toUnixTime()).toBe(row?.startsAt);
    expect(mail?.subject).not.toContain('Wren');
  });

  it('cannot be done twice', async () => {
    const { context, enquiryId } = await deskWithEnquiry();
    const { held } = await holdFirst(context, enquiryId);
    await bookTrial({ offerId: held.offerId }, context);
    await expect(bookTrial({ offerId: held.offerId }, context)).rejects.toMatchObject({ code: 'conflict' });
    expect(await context.db('occurrence')).toHaveLength(1);
  });
});
