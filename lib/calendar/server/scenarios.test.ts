import { describe, expect, it } from 'vitest';
import type { Db } from '@/db/connection';
import { lessonTypeByCode, type LessonTypeCode } from '@/db/lesson-types';
import { insertPerson } from '@/db/people';
import { allTerms, closuresBetween } from '@/db/terms';
import { transaction } from '@/db/transaction';
import type { Context } from '@/lib/server/context';
import { localDateOf, minuteOfDayOf } from '@/lib/time';
import { lanternStreet } from '@/tests/factories/lantern-street';
import { contextOf } from '@/tests/support/context';
import { freshDb } from '@/tests/support/fresh-db';
import expected from '@/tests/published/data/scenarios-expected.json';
import { spanOf } from '../lesson-time';
import { teachingDates, closedDatesFor } from '../term';
import { clashesWith } from './booking-rules';
import { enrolStudent } from './enrol-student';
import { markAttendance } from './mark-attendance';
import { placeBooking, type Placement } from './place-booking';

const ZONE = 'America/New_York';
const TUESDAY = '2026-09-15';

async function desk(now = Date.UTC(2026, 8, 1, 12) / 1000): Promise<Context> {
  const db = freshDb();
  await lanternStreet(db);
  return contextOf(db, 'desk', { personId: 'pat', now, school: { zone: ZONE, currency: 'USD', locale: 'en-US' } });
}

type Wish = { teacherId: string | null; students: string[]; room: string; at: string; minutes?: number; date?: string; type?: LessonTypeCode; title?: string };

async function placement(db: Db, { teacherId, students, room, at, minutes = 30, date = TUESDAY, type = 'single', title = '' }: Wish): Promise<Placement> {
  const [hour = 0, minute = 0] = at.split(':').map(Number);
  const siteId = room.startsWith('m') ? 'mill' : 'quay';
  return {
    lessonType: await lessonTypeByCode(db, type), subjectId: null, level: null, title, siteId, roomId: room, teacherId, studentIds: students, mode: 'in_room',
    localDate: date, startMin: hour * 60 + minute, lengthMinutes: minutes, zone: ZONE, source: 'roster',
  };
}

const book = async (context: Context, wish: Wish) => {
  const placed = await placement(context.db, wish);
  return transaction(context.db, (trx) => placeBooking(trx, context, placed));
};

describe('S03 clash verdicts', () => {
  async function busyTuesday(): Promise<Context> {
    const context = await desk();
    await book(context, { teacherId: 'mara', students: ['ada'], room: 'q1', at: '16:00' });
    await book(context, { teacherId: 'leo', students: ['ben'], room: 'm1', at: '16:00' });
    await book(context, { teacherId: null, students: [], room: 'hall', at: '17:00', minutes: 60, type: 'rehearsal', title: 'the rehearsal' });
    return context;
  }

  it('C1 saves what only touches', async () => {
    const context = await busyTuesday();
    await expect(book(context, { teacherId: 'mara', students: ['theo'], room: 'q1', at: '16:30' })).resolves.toMatchObject({ notes: [] });
  });

  it.each([
    { id: 'C2', wish: { teacherId: 'ines', students: ['uma'], room: 'q1', at: '16:15' }, rule: 'room', amount: expected.S03.c2, words: 'Q1 is taken by Ada Vale with Mara for 15 minutes' },
    { id: 'C3', wish: { teacherId: 'mara', students: ['uma'], room: 'm1', at: '16:45' }, rule: 'travel', amount: expected.S03.c3, words: 'short by 10 minutes to get from Quay to Mill' },
    { id: 'C5', wish: { teacherId: 'ines', students: ['ada'], room: 'q2', at: '16:20' }, rule: 'student', amount: expected.S03.c5, words: 'Ada Vale is taken' },
    { id: 'C6', wish: { teacherId: 'ines', students: ['uma'], room: 'hall', at: '16:25' }, rule: 'turnover', amount: expected.S03.c6, words: 'short by 5' },
  ])('$id is refused: $words', async ({ wish, rule, amount, words }) => {
    const context = await busyTuesday();
    const clashes = await clashesWith(context.db, await placement(context.db, wish));
    expect(clashes).toMatchObject([{ rule, amount, isHard: true }]);
    await expect(book(context, wish)).rejects.toMatchObject({ code: 'conflict', message: expect.stringContaining(words) as string });
  });

  it('C4 is saved with a soft note', async () => {
    const context = await busyTuesday();
    const placed = await book(context, { teacherId: 'leo', students: ['ben'], room: 'm1', at: '16:30' });
    expect(placed.notes).toMatchObject([{ rule: 'long_stretch', isHard: false, amount: 60, sentence: '60 minutes in a row for Ben Vale.' }]);
  });

  it('C7 refuses a group of nine where eight can sit', async () => {
    const context = await busyTuesday();
    const students = Array.from({ length: 9 }, (_, index) => `student-${index}`);
    await transaction(context.db, async (trx) => { for (const id of students) await insertPerson(trx, { id, givenName: id, familyName: '', isStudent: true }); });
    await expect(book(context, { teacherId: 'ines', students, room: 'q3', at: '10:00', type: 'group' })).rejects.toMatchObject({ message: 'Q3 has 8 seats; over by 1.' });
  });

  it('C8 lets exactly one of four desks have the place', async () => {
    const context = await desk();
    const wishes = [['mara', 'ada'], ['leo', 'ben'], ['ines', 'uma'], ['mara', 'vik']] as const;
    const results = await Promise.allSettled(wishes.map(([teacherId, student]) => book(context, { teacherId, students: [student], room: 'q2', at: '15:00', date: '2026-09-18' })));
    expect(results.filter(({ status }) => status === 'fulfilled')).toHaveLength(1);
    for (const result of results) if (result.status === 'rejected') expect(String(result.reason)).toContain('Q2 is taken by');
    expect(await context.db('occurrence')).toHaveLength(1);
  });
});

it('S04 counts the lessons per weekday from the stored terms and closures', async () => {
  const { db } = await desk();
  const counts = new Map<string, number[]>();
  for (const term of await allTerms(db)) {
    const closed = closedDatesFor(await closuresBetween(db, term.startsOn, term.endsOn), 'quay', 960, 30);
    counts.set(term.id, [1, 2, 3, 4, 5, 6].map((weekday) => teachingDates(weekday, term, closed).length));
  }
  expect(Object.fromEntries(counts)).toEqual({ autumn: expected.S04.autumn, winter: expected.S04.winter, spring: expected.S04.spring });
});

it('S05 keeps ten o’clock in New York across both clock changes and refuses the teacher in Dublin only on 25 October', async () => {
  const context = await desk();
  const lessons = ['2026-10-18', '2026-10-25', '2026-11-01', '2026-11-08', '2026-11-15'];
  for (const date of lessons) {
    const wish = await placement(context.db, { teacherId: 'ines', students: ['theo'], room: 'q1', at: '10:00', date });
    await transaction(context.db, (trx) => placeBooking(trx, context, { ...wish, roomId: null, mode: 'online' }));
  }
  const rows: { startsAt: number }[] = await context.db('occurrence').orderBy('startsAt').select('startsAt');
  const clock = (zone: string) => rows.map(({ startsAt }) => minuteOfDayOf(startsAt, zone)).map((m) => `${String(Math.floor(m / 60)).padStart(2, '0')}:${String(m % 60).padStart(2, '0')}`);
  expect(clock('UTC')).toEqual(expected.S05.utc);
  expect(clock('Europe/Dublin')).toEqual(expected.S05.dublin);
  expect(clock(ZONE)).toEqual(lessons.map(() => '10:00'));

  const inDublin = async (date: string) => {
    const wish: Placement = {
      ...(await placement(context.db, { teacherId: 'ines', students: ['uma'], room: 'q1', at: '14:00', date })), roomId: null, mode: 'online', siteId: 'canal', zone: 'Europe/Dublin',
    };
    return (await clashesWith(context.db, wish)).filter(({ rule }) => rule === 'teacher').length;
  };
  expect(await Promise.all(lessons.map(inDublin))).toEqual([0, 1, 0, 0, 0]);
});

describe('S06 the deadline is the same clock time the day before', () => {
  it.each([
    { date: '2026-11-01', start: expected.S06.start_autumn, deadline: expected.S06.deadline_autumn, hours: expected.S06.real_hours_autumn },
    { date: '2027-03-14', start: expected.S06.start_spring, deadline: expected.S06.deadline_spring, hours: expected.S06.real_hours_spring },
  ])('$date: $hours real hours before', async ({ date, start, deadline, hours }) => {
    const context = await desk();
    await book(context, { teacherId: 'mara', students: ['ada'], room: 'q1', at: '16:00', date });
    const row = await context.db<{ startsAt: number; cancelDeadlineAt: number }>('occurrence').first();
    expect(new Date((row?.startsAt ?? 0) * 1000).toISOString()).toBe(start.replace('Z', '.000Z'));
    expect(new Date((row?.cancelDeadlineAt ?? 0) * 1000).toISOString()).toBe(deadline.replace('Z', '.000Z'));
    expect(((row?.startsAt ?? 0) - (row?.cancelDeadlineAt ?? 0)) / 3600).toBe(hours);
  });

  it.each([
    { toldAt: Date.UTC(2026, 9, 31, 20, 0, 0) / 1000, verdict: 'away_with_notice' },
    { toldAt: Date.UTC(2026, 9, 31, 20, 0, 1) / 1000, verdict: 'late_notice' },
    { toldAt: Date.UTC(2026, 9, 31, 19, 58, 0) / 1000, verdict: 'away_with_notice' },
  ])('told at $toldAt and typed at 16:20 is $verdict', async ({ toldAt, verdict }) => {
    const context = await desk(Date.UTC(2026, 9, 31, 20, 20) / 1000);
    await book(context, { teacherId: 'mara', students: ['ada'], room: 'q1', at: '16:00', date: '2026-11-01' });
    const seat = await context.db<{ id: string }>('seat').first();
    const marked = await markAttendance({ seatId: seat?.id ?? '', attendance: 'late_notice', minutesLate: null, toldAt, toldVia: 'phone', rowVersion: 1 }, context);
    expect(marked.attendance).toBe(verdict);
  });
});

describe('enrolling', () => {
  const enrolment = { enquiryId: null, studentId: 'uma', familyId: null, subjectId: 'keyboard', level: 1, teacherId: 'mara', roomId: 'q1', siteId: 'quay', localDate: '2026-10-19', startMin: 960, lengthMinutes: 30, hasAcceptedTerms: true as const };

  it('writes the weekly lessons of S01: nine Mondays at the same wall-clock time', async () => {
    const context = await desk();
    const { dates } = await enrolStudent(enrolment, context);
    expect(dates).toHaveLength(expected.S01.lessons);
    const rows: { startsAt: number; localDate: string }[] = await context.db('occurrence').orderBy('startsAt');
    expect(rows.map(({ startsAt }) => localDateOf(startsAt, ZONE))).toEqual(dates);
    expect(new Set(rows.map(({ startsAt }) => minuteOfDayOf(startsAt, ZONE)))).toEqual(new Set([960]));
    expect(new Set(rows.map(({ startsAt }) => minuteOfDayOf(startsAt, 'UTC')))).toEqual(new Set([1200, 1260]));
  });

  it('writes nothing at all when one date clashes', async () => {
    const context = await desk();
    await book(context, { teacherId: 'mara', students: ['ada'], room: 'q1', at: '16:15', date: '2026-11-30' });
    await expect(enrolStudent(enrolment, context)).rejects.toMatchObject({ code: 'conflict' });
    expect(await context.db('occurrence')).toHaveLength(1);
    expect(await context.db('enrolment')).toHaveLength(0);
    expect(await context.db('family')).toHaveLength(0);
  });

  it('is not for teachers or guardians', async () => {
    const context = await desk();
    for (const role of ['teacher', 'guardian', 'student'] as const) {
      await expect(enrolStudent(enrolment, contextOf(context.db, role))).rejects.toMatchObject({ code: 'not_found' });
    }
  });
});

it('derives the instant from the wall clock and refuses an overlap written past every rule', async () => {
  const context = await desk();
  await book(context, { teacherId: 'mara', students: ['ada'], room: 'q1', at: '16:00' });
  const span = spanOf({ localDate: TUESDAY, startMin: 975, lengthMinutes: 30, zone: ZONE });
  const occurrence = await context.db<{ id: string }>('occurrence').first();
  await expect(context.db('hold').insert({ holderKind: 'room', holderId: 'q1', ...span, occurrenceId: occurrence?.id })).rejects.toThrow('hold_overlap');
  await expect(context.db('hold').where({ holderKind: 'teacher' }).update({ holderKind: 'room', holderId: 'q1' })).rejects.toThrow('hold_overlap');
});
