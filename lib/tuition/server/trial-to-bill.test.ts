import { describe, expect, it } from 'vitest';
import { trialsOfEnquiry } from '@/db/enquiries';
import { findTuitionRun, itemsOfRun } from '@/db/tuition-runs';
import { bookTrial } from '@/lib/calendar/server/book-trial';
import { enrolStudent } from '@/lib/calendar/server/enrol-student';
import { holdOpening } from '@/lib/calendar/server/hold-opening';
import { receiveEnquiry } from '@/lib/calendar/server/receive-enquiry';
import type { Context } from '@/lib/server/context';
import { localDateOf } from '@/lib/time';
import { lanternMoney } from '@/tests/factories/lantern-money';
import { lanternStreet } from '@/tests/factories/lantern-street';
import { contextOf } from '@/tests/support/context';
import { freshDb } from '@/tests/support/fresh-db';
import expected from '@/tests/published/data/scenarios-expected.json';
import { previewTuitionRun } from './preview-tuition-run';
import { releaseTuitionRun } from './release-tuition-run';

const NEW_YORK = { zone: 'America/New_York', currency: 'USD', locale: 'en-US' };
/** Ten in the morning, summer time, of a day of 2026 in New York. */
const at = (month: number, day: number) => Date.UTC(2026, month - 1, day, 14) / 1000;
const PLACE = { teacherId: 'mara', roomId: 'q1', siteId: 'quay', startMin: 960, lengthMinutes: 30 };
const ENQUIRY = {
  contactName: 'Lena Reyes', contactEmail: 'lena@example.com', contactPhone: '0155 010 0143', studentName: 'Uma Reyes', isAdult: false, studentAge: 14,
  experience: '', wishes: [{ weekday: 5, fromMin: 900, toMin: 1080 }], siteId: 'quay', lengthMinutes: 30, message: '', mayWrite: true as const, website: '',
};

type Afterwards = { desk: Context; enquiryId: string; studentId: string };

/** Uma's enquiry of 28 September, held and booked as a trial on Friday 2 October. */
async function afterTheTrial(): Promise<Afterwards> {
  const db = freshDb();
  await lanternStreet(db);
  await lanternMoney(db);
  const desk = contextOf(db, 'desk', { personId: 'pat', now: at(9, 28), school: NEW_YORK });
  await receiveEnquiry(ENQUIRY, { db, now: at(9, 28), address: '10.0.0.1' });
  const row: { id: string } | undefined = await db('enquiry').first('id');
  const enquiryId = row?.id ?? '';
  const { offerId } = await holdOpening({ ...PLACE, localDate: '2026-10-02', enquiryId, subjectId: 'keyboard', isWeekly: false }, desk);
  const { studentId } = await bookTrial({ offerId }, desk);
  return { desk, enquiryId, studentId };
}

async function billTheAutumn(owner: Context) {
  const { runId } = await previewTuitionRun({ kind: 'term', period: 'autumn', dueOn: '2026-10-30', instalments: 1, depositPercent: 0 }, owner);
  const controlTotalMinor = (await findTuitionRun(owner.db, runId))?.controlTotalMinor ?? -1;
  return releaseTuitionRun({ runId, controlTotalMinor }, owner);
}

/** Enrolled on that day for Mondays from 19 October, then billed with the autumn term. */
async function firstBill(enrolledAt: number) {
  const { desk, enquiryId, studentId } = await afterTheTrial();
  const enrolling = { ...PLACE, localDate: '2026-10-19', enquiryId, studentId, familyId: null, subjectId: 'keyboard', level: 1, hasAcceptedTerms: true as const };
  const enrolled = await enrolStudent(enrolling, { ...desk, now: enrolledAt, today: localDateOf(enrolledAt, NEW_YORK.zone) });
  const { db } = desk;
  const owner = contextOf(db, 'owner', { personId: 'ruth', now: enrolledAt, school: NEW_YORK });
  const { runId, ...released } = await billTheAutumn(owner);
  const [item] = await itemsOfRun(db, runId);
  const lines: { text: string; quantity: number; unitMinor: number; netMinor: number }[] =
    await db('invoice_line').where({ invoiceId: item?.invoiceId ?? '' }).orderBy('lineNo').select('text', 'quantity', 'unitMinor', 'netMinor');
  return { db, owner, enrolled, released, item, lines };
}

describe('S01 from the trial to the first bill', () => {
  it('keeps with the trial what it costs and until when it is credited', async () => {
    const { desk, enquiryId } = await afterTheTrial();
    expect(await trialsOfEnquiry(desk.db, enquiryId)).toMatchObject([{ feeMinor: 2500, creditUntilOn: '2026-10-16' }]);
  });

  it('credits the trial fee when enrolling on 13 October: 388.00', async () => {
    const { enrolled, released, item, lines } = await firstBill(at(10, 13));
    expect(enrolled.dates).toHaveLength(expected.S01.lessons);
    expect(enrolled.dates).toEqual(['2026-10-19', '2026-10-26', '2026-11-02', '2026-11-09', '2026-11-16', '2026-11-23', '2026-11-30', '2026-12-07', '2026-12-14']);
    expect(released).toMatchObject({ invoices: 1, totalMinor: expected.S01.total });
    expect(item).toMatchObject({ familyId: enrolled.familyId, state: 'released', totalMinor: expected.S01.total });
    expect(lines.map(({ quantity, unitMinor, netMinor }) => [quantity, unitMinor, netMinor])).toEqual([[9, 4200, 37_800], [1, -2500, -2500], [1, 3500, 3500]]);
  });

  it('leaves the trial fee where it is when enrolling on 17 October: 413.00', async () => {
    const { released, lines } = await firstBill(at(10, 17));
    expect(released).toMatchObject({ invoices: 1, totalMinor: expected.S01.total + 2500 });
    expect(lines.map(({ netMinor }) => netMinor)).toEqual([37_800, 3500]);
  });

  it('still credits on 16 October, the last of the fourteen days', async () => {
    expect((await firstBill(at(10, 16))).released.totalMinor).toBe(expected.S01.total);
  });

  it('bills the rest of the term once: worked out again, nothing is left', async () => {
    const { db, owner } = await firstBill(at(10, 13));
    const { runId } = await previewTuitionRun({ kind: 'term', period: 'autumn', dueOn: '2026-10-30', instalments: 1, depositPercent: 0 }, owner);
    expect(await itemsOfRun(db, runId)).toEqual([]);
  });

  it('credits the fee once per trial: a second enrolment from the same enquiry pays its tuition in full, in the same bill or a later one', async () => {
    const { desk, enquiryId, studentId } = await afterTheTrial();
    const enrol = (localDate: string, startMin: number) => enrolStudent(
      { ...PLACE, startMin, localDate, enquiryId, studentId, familyId: null, subjectId: 'keyboard', level: 1, hasAcceptedTerms: true as const },
      { ...desk, now: at(10, 13), today: '2026-10-13' },
    );
    await enrol('2026-10-19', 960);
    await enrol('2026-10-20', 960);
    const owner = contextOf(desk.db, 'owner', { personId: 'ruth', now: at(10, 13), school: NEW_YORK });
    const credits = async () => {
      const rows: { netMinor: number }[] = await desk.db('invoice_line').where('text', 'like', '%trial fee%').select('netMinor');
      return rows.map(({ netMinor }) => netMinor);
    };
    await billTheAutumn(owner);
    expect(await credits()).toEqual([-2500]);
    await enrol('2026-10-22', 960);
    const { invoices } = await billTheAutumn(owner);
    expect(invoices).toBe(1);
    expect(await credits()).toEqual([-2500]);
  });
});
