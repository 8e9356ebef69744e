import { randomUUID } from 'node:crypto';
import { copyFileSync, rmSync } from 'node:fs';
import path from 'node:path';
import type { Knex } from 'knex';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import { openDatabase } from '@/db/connection';
import { accessHouse, contextOfColumn } from '@/tests/factories/access-house';
import { AppError } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import { instantOf } from '@/lib/time';
import { addClosure } from '@/lib/calendar/server/add-closure';
import { addTerm } from '@/lib/calendar/server/add-term';
import { bookByHand } from '@/lib/calendar/server/book-by-hand';
import { CONSEQUENCES } from '@/lib/calendar/consequences';
import { calendarEntries } from '@/lib/calendar/server/calendar-week';
import { changeConsequence, readConsequences } from '@/lib/calendar/server/change-consequence';
import { boardLessons } from '@/lib/calendar/server/day-board';
import { familyLessons, reportAbsence } from '@/lib/calendar/server/family-lessons';
import { checkIn, markAttendance } from '@/lib/calendar/server/mark-attendance';
import { readEnquiries } from '@/lib/calendar/server/read-enquiries';
import { readTerms } from '@/lib/calendar/server/read-terms';
import { takeClosureAway } from '@/lib/calendar/server/take-closure-away';
import { takeEnquiryList } from '@/lib/calendar/server/take-enquiry-list';
import { takeEnquiry } from '@/lib/calendar/server/take-enquiry';
import { deskEnquirySchema } from '@/lib/calendar/schema';
import { importList } from '@/lib/imports/server/import-screen';
import { agreeHearing } from '@/lib/ladder/server/agree-hearing';
import { askForRecheck } from '@/lib/ladder/server/ask-recheck';
import { hearingScreen } from '@/lib/ladder/server/hearing-screen';
import { installLadder } from '@/lib/ladder/server/install-ladder';
import { ladderOfStudent } from '@/lib/ladder/server/ladder-of-student';
import { schoolLadder } from '@/lib/ladder/server/school-ladder';
import { startHearing } from '@/lib/ladder/server/start-hearing';
import { askAboutPay, passOverTeacher } from '@/lib/payroll/server/check-pay';
import { gatherPayRun } from '@/lib/payroll/server/gather-pay-run';
import { beginRate, readRates } from '@/lib/payroll/server/pay-rates';
import { payRunScreen } from '@/lib/payroll/server/pay-run-screen';
import { payWorkbook } from '@/lib/payroll/server/pay-workbook';
import { teacherPay } from '@/lib/payroll/server/teacher-pay';
import { readAccess } from '@/lib/people/server/access';
import { changeReach } from '@/lib/people/server/change-reach';
import { changeHouseRule, readHouseRules } from '@/lib/people/server/house-rules';
import { invitePerson } from '@/lib/people/server/invite-person';
import { readFamily } from '@/lib/people/server/read-families';
import { readStudent } from '@/lib/people/server/read-students';
import { takeFamilyList } from '@/lib/people/server/take-family-list';
import { takeStudentList } from '@/lib/people/server/take-student-list';
import { askForRelease } from '@/lib/tuition/server/ask-for-release';
import { payerInvoice } from '@/lib/tuition/server/payer-bills';
import { previewTuitionRun } from '@/lib/tuition/server/preview-tuition-run';
import { readPriceList, setPrice } from '@/lib/tuition/server/price-list';
import { paymentList, staffInvoice } from '@/lib/tuition/server/staff-invoice';
import { takeBillList } from '@/lib/tuition/server/take-bill-list';
import { takeDeskPayment } from '@/lib/tuition/server/take-desk-payment';
import { takeInvoiceList } from '@/lib/tuition/server/take-invoice-list';
import { takePaymentList } from '@/lib/tuition/server/take-payment-list';
import { tuitionRunDetail } from '@/lib/tuition/server/tuition-run-screen';
import { COLUMNS, LATER, MATRIX, type BuiltRow, type Column, type RowName, type Verb } from './matrix';

/** What an attempt is about: records of the person’s own, or of a family and a teacher they have nothing to do with. */
type Target = { studentId: string; familyId: string; payerId: string; engagementId: string; invoiceId: string; seatToday: string; seatNextWeek: string; seatLastMonth: string };
type Attempt = (context: Context, target: Target) => Promise<unknown>;

let db: Knex;
let made: Awaited<ReturnType<typeof accessHouse>>;
let file: string;
beforeAll(async () => {
  file = path.join(path.dirname(inject('templateFile')), `${randomUUID()}.db`);
  copyFileSync(inject('templateFile'), file);
  db = openDatabase(file);
  made = await accessHouse(db);
}, 60_000);
afterAll(async () => {
  await db.destroy();
  for (const suffix of ['', '-wal', '-shm']) rmSync(file + suffix, { force: true });
});

const ZONE = 'America/New_York';
const TODAY = { startsAt: instantOf('2026-11-17', 0, ZONE), endsAt: instantOf('2026-11-18', 0, ZONE) };
const mark = (attendance: 'present' | 'excused'): Attempt => (context, { seatToday }) =>
  markAttendance({ seatId: seatToday, attendance, minutesLate: null, toldAt: null, toldVia: 'desk', rowVersion: 1 }, context);
const MARK = { minutesLate: null, toldAt: null, toldVia: 'desk' } as const;
/** A closed pay run refuses everybody alike, with words of its own. */
const markLocked: Attempt = async (context, { seatLastMonth }) => {
  await context.db('occurrence').whereIn('id', context.db('seat').where({ id: seatLastMonth }).select('occurrenceId')).update({ lockedByPayRunId: made.payRunId });
  try {
    return await markAttendance({ ...MARK, seatId: seatLastMonth, attendance: 'no_show', rowVersion: 2 }, context);
  } catch (error) {
    if (error instanceof AppError && error.code === 'conflict' && error.message.startsWith('This lesson is in a closed pay run.')) return null;
    throw error;
  }
};
const always = (work: (context: Context) => Promise<unknown>): Attempt => async (context) => { await work(context); return true; };

/** Every list, one after the other: who may take one may take them all, or the grants are crooked. */
async function takesEveryList(context: Context): Promise<boolean> {
  const lists: Attempt[] = [takeStudentList, takeFamilyList, takeEnquiryList, takeInvoiceList, takePaymentList, (asking) => takeBillList({ runId: made.runId }, asking), (asking) => payWorkbook({ runId: made.payRunId, as: 'csv' }, asking)];
  let taken = 0;
  for (const take of lists) {
    try {
      await take(context, {} as Target);
      taken += 1;
    } catch (error) {
      if (!(error instanceof AppError) || !['not_found', 'forbidden'].includes(error.code)) throw error;
    }
  }
  if (taken !== 0 && taken !== lists.length) throw new Error(`${taken} of ${lists.length} lists were given out`);
  return taken > 0;
}

/** A term, a closed day and its taking away: who may do one may do all three. */
async function changesTerms(context: Context): Promise<void> {
  const tries = [
    () => addTerm({ name: 'Summer', startsOn: '2027-07-05', endsOn: '2027-07-30' }, context),
    () => addClosure({ from: '2027-03-01', until: '2027-03-01', siteId: '', reason: 'Staff day', fromTime: '', toTime: '' }, context),
    () => takeClosureAway({ closureId: made.closureId }, context),
  ];
  const refusals: unknown[] = [];
  for (const attempt of tries) await attempt().catch((error: unknown) => refusals.push(error));
  if (refusals.length === tries.length) throw refusals[0];
  if (refusals.length > 0) throw new Error(`${refusals.length} of ${tries.length} changes of terms were refused`);
}

/** One attempt for each verb of each row. A record that is not shown, a null and a refusal are all "none". */
const ATTEMPTS: Record<RowName, Partial<Record<Verb, Attempt>>> = {
  calendar: {
    read: async (context, { studentId }) => {
      const lessons = await boardLessons(context, TODAY);
      const own = (await familyLessons({ from: '2026-11-17', until: '2026-11-18' }, context)).students;
      return lessons.some(({ seats }) => seats.some((seat) => seat.studentId === studentId)) || own.some(({ id }) => id === studentId);
    },
    write: always((context) => bookByHand({ lessonTypeCode: 'meeting', title: 'Meeting', studentId: null, teacherId: null, roomId: 'm1', localDate: '2026-11-18', start: '10:00', lengthMinutes: 30 }, context)),
  },
  busyTimes: { read: async (context) => (await calendarEntries({ from: TODAY.startsAt, until: TODAY.endsAt, teacherId: 'viktor' }, context)).some(({ kind }) => kind === 'busy' || kind === 'lesson') },
  attendance: { write: mark('present') },
  attendanceAfter: { write: (context, { seatLastMonth }) => markAttendance({ ...MARK, seatId: seatLastMonth, attendance: 'no_show', rowVersion: 2 }, context) },
  attendanceBefore: { write: (context, { seatNextWeek }) => markAttendance({ ...MARK, seatId: seatNextWeek, attendance: 'away_with_notice', rowVersion: 1 }, context) },
  attendanceLocked: { write: markLocked },
  absence: { write: (context, { seatNextWeek }) => reportAbsence({ seatId: seatNextWeek }, context) },
  arrival: { write: async (context, { seatToday }) => { await checkIn({ seatId: seatToday, hasArrived: true }, context); return true; } },
  excuse: { write: mark('excused') },
  student: { read: (context, { studentId }) => readStudent({ id: studentId }, context) },
  contacts: { read: async (context, { studentId, familyId }) => ((await readStudent({ id: studentId }, context))?.contacts ?? null) ?? readFamily({ id: familyId }, context) },
  enquiries: {
    read: always(readEnquiries),
    write: always((context) => takeEnquiry(deskEnquirySchema.parse({ contactName: 'Wren', contactEmail: 'wren@example.com', contactPhone: '', studentName: 'Wren', source: 'phone', wishes: [{ weekday: 2, fromMin: 900, toMin: 1080 }] }), context)),
  },
  prices: { read: always(readPriceList), write: always((context) => setPrice({ productId: 'lesson', lengthMinutes: 30, amount: '43', validFrom: '2027-01-01' }, context)) },
  houseRules: { read: always(readHouseRules), write: always((context) => changeHouseRule({ key: 'credit.valid_days', value: 90, validFrom: '2027-01-01' }, context)) },
  consequences: { read: always(readConsequences), write: always((context) => changeConsequence({ mark: 'no_show', consequence: CONSEQUENCES.late_notice, validFrom: '2027-01-01' }, context)) },
  terms: { read: always(readTerms), write: always(changesTerms) },
  invoice: { read: (context, { invoiceId }) => staffInvoice({ invoiceId }, context) },
  share: { read: (context, { invoiceId }) => payerInvoice({ invoiceId }, context) },
  payment: {
    read: always(paymentList),
    write: (context, { payerId }) => takeDeskPayment({ payerId, amount: '10.00', method: 'cash', receivedOn: '2026-11-17', note: '', requestKey: randomUUID() }, context),
  },
  tuitionRun: {
    read: always((context) => tuitionRunDetail({ runId: made.runId }, context)),
    write: always((context) => previewTuitionRun({ kind: 'term', period: 'winter', dueOn: '2027-01-11', instalments: 1, depositPercent: 0 }, context)),
    approve: always((context) => askForRelease({ runId: made.runId, controlTotalMinor: 0 }, context)),
  },
  payRun: {
    read: always((context) => payRunScreen({ payRunId: made.payRunId }, context)),
    write: always((context) => gatherPayRun({ payRunId: made.payRunId }, context)),
    approve: always((context) => passOverTeacher({ payRunId: made.payRunId, engagementId: 'engagement-mara', reason: 'On leave' }, { ...context, today: '2026-11-21' })),
  },
  rates: {
    read: always(readRates),
    write: always((context) => beginRate({ engagementId: 'engagement-mara', workType: 'lesson', lessonTypeId: null, lengthMinutes: 30, seatsFrom: null, seatsTo: null, per: 'lesson', amount: '25', validFrom: '2027-01-01' }, context)),
  },
  payLines: {
    read: (context, { engagementId }) => teacherPay({ payRunId: made.payRunId, engagementId }, context),
    write: async (context, { engagementId }) => { await askAboutPay({ payRunId: made.payRunId, engagementId, lineId: null, aboutOn: '2026-10-06', text: 'Was the rehearsal counted?' }, context); return true; },
  },
  progress: { read: (context, { studentId }) => ladderOfStudent(studentId, context) },
  hearing: {
    read: (context, { studentId }) => hearingScreen({ studentId }, context),
    write: (context, { studentId }) => startHearing({ studentId, rungId: made.rungId, leadReason: '' }, context),
    approve: (context, { studentId }) => agreeHearing({ studentId, rungId: made.rungId, reason: 'Moves away in a week' }, context),
  },
  recheck: {
    write: async (context, { studentId }) => {
      await context.db('rung_credit').insert({ id: randomUUID(), studentId, rungId: made.rungId, cause: 'placement', reason: 'Placed', byId: 'ruth', creditedOn: '2026-09-07', at: 1 });
      return askForRecheck({ studentId, rungId: made.rungId, reason: 'Standards meeting' }, context);
    },
  },
  reach: { write: (context, { studentId }) => changeReach({ studentId, reachSemitones: 9 }, context) },
  ladder: { read: schoolLadder, approve: always((context) => installLadder({}, context)) },
  accounts: { read: always(readAccess), write: always((context) => invitePerson({ personId: 'viktor', email: 'viktor@example.org', role: 'teacher' }, context)) },
  exports: { export: takesEveryList },
  imports: { read: always(importList) },
};

const OWN: Record<Column, { studentId: string; engagementId: string; foreignEngagementId: string }> = {
  owner: { studentId: 'ada', engagementId: 'engagement-mara', foreignEngagementId: 'engagement-leo' }, desk: { studentId: 'ada', engagementId: 'engagement-mara', foreignEngagementId: 'engagement-leo' },
  teacher: { studentId: 'ada', engagementId: 'engagement-mara', foreignEngagementId: 'engagement-leo' }, substitute: { studentId: 'ben', engagementId: 'engagement-leo', foreignEngagementId: 'engagement-mara' },
  lead: { studentId: 'theo', engagementId: 'engagement-ines', foreignEngagementId: 'engagement-mara' }, student: { studentId: 'theo', engagementId: 'engagement-mara', foreignEngagementId: 'engagement-leo' },
  guardian: { studentId: 'ada', engagementId: 'engagement-mara', foreignEngagementId: 'engagement-leo' },
};
const FAMILY: Record<string, { familyId: string; payerId: string }> = {
  ada: { familyId: 'vale', payerId: 'payer-noor' }, ben: { familyId: 'vale', payerId: 'payer-noor' }, theo: { familyId: 'marsh', payerId: 'payer-theo' }, uma: { familyId: 'reyes', payerId: 'payer-rosa' },
};

async function targetOf(column: Column, whose: 'own' | 'foreign'): Promise<Target> {
  const own = OWN[column];
  const studentId = whose === 'own' ? own.studentId : 'uma';
  const family = FAMILY[studentId]!;
  const seats: { id: string; localDate: string }[] = await db('seat as s').join('occurrence as o', 'o.id', 's.occurrenceId').where({ studentId }).select('s.id', 'o.localDate');
  const invoice = await db<{ id: string; familyId: string }>('invoice').where({ familyId: family.familyId }).first('id');
  const seatOn = (date: string) => seats.find(({ localDate }) => localDate === date)!.id;
  return { studentId, ...family, engagementId: whose === 'own' ? own.engagementId : own.foreignEngagementId, invoiceId: invoice!.id, seatToday: seatOn('2026-11-17'), seatNextWeek: seatOn('2026-11-24'), seatLastMonth: seatOn('2026-10-06') };
}

class Undone extends Error {}

/** Tries it within a transaction that is undone, so that each attempt meets the same school. Only "not found" and "forbidden" count as a refusal. */
async function isAllowed(attempt: Attempt, column: Column, target: Target): Promise<boolean> {
  const context = await contextOfColumn(db, column);
  let allowed = false;
  await db.transaction(async (trx) => {
    try {
      allowed = Boolean(await attempt({ ...context, db: trx }, target));
    } catch (error) {
      if (!(error instanceof AppError) || !['not_found', 'forbidden'].includes(error.code)) throw error;
    }
    throw new Undone();
  }).catch((error: unknown) => { if (!(error instanceof Undone)) throw error; });
  return allowed;
}

const CELLS = (Object.keys(MATRIX) as RowName[]).flatMap((name) => COLUMNS.map((column) => ({ name, column, row: MATRIX[name] })));

describe('the written access matrix', () => {
  it.each(CELLS)('$row.thing, $column', async ({ name, column, row }) => {
    const cell = row.cells[column];
    const rights: readonly string[] = cell === 'none' ? [] : cell;
    for (const verb of row.tries) {
      const attempt = ATTEMPTS[name][verb];
      if (!attempt) throw new Error(`${row.thing} has no attempt to ${verb}`);
      for (const whose of ['own', 'foreign'] as const) {
        const expected = rights.includes(`${verb} all`) || (whose === 'own' && rights.includes(`${verb} own`));
        expect(await isAllowed(attempt, column, await targetOf(column, whose)), `${verb} ${whose}`).toBe(expected);
      }
    }
  });
  it('every right that is written down is tried, and every attempt belongs to a row', () => {
    for (const [name, row] of Object.entries(MATRIX) as [RowName, BuiltRow][]) {
      const verbs = new Set(Object.values(row.cells).flatMap((cell) => (cell === 'none' ? [] : cell.map((right) => right.split(' ')[0]))));
      for (const verb of verbs) expect(row.tries, `${row.thing}: ${String(verb)}`).toContain(verb);
      expect(Object.keys(ATTEMPTS[name]).sort()).toEqual([...row.tries].sort());
    }
  });
  it('what is still to come is named once and tried nowhere', () => {
    const built = new Set(Object.values(MATRIX).map(({ thing }) => thing as string));
    expect(new Set(LATER.map(({ thing }) => thing)).size).toBe(LATER.length);
    expect(LATER.filter(({ thing, from }) => built.has(thing) || from === '')).toEqual([]);
  });
});
