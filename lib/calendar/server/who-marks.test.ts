import { beforeEach, expect, it } from 'vitest';
import type { Knex } from 'knex';
import { ownRecords } from '@/db/actors';
import { enrolled, lanternMoney } from '@/tests/factories/lantern-money';
import { lanternStreet } from '@/tests/factories/lantern-street';
import { contextOf } from '@/tests/support/context';
import { freshDb } from '@/tests/support/fresh-db';
import type { Context } from '@/lib/server/context';
import { markAttendance } from './mark-attendance';

const DAYS = ['2026-11-10', '2026-11-17', '2026-11-24'] as const;
const school = { zone: 'America/New_York' };
const NOW = Date.UTC(2026, 10, 17, 23) / 1000;

let db: Knex;
beforeEach(async () => {
  db = freshDb();
  await lanternStreet(db);
  await lanternMoney(db);
  await enrolled(db, { studentId: 'ada', familyId: 'vale', teacherId: 'mara', dates: DAYS });
  await db('occurrence').update({ plannedTeacherId: 'mara', taughtById: 'leo' });
});
const teacher = async (personId: string, isLead = false): Promise<Context> => {
  const own = await ownRecords(db, personId, 'teacher', '2026-11-17');
  return contextOf(db, 'teacher', { personId, isLead, now: NOW, school, ...own });
};
async function mark(localDate: string, context: Context): Promise<string> {
  const [seat]: { id: string; rowVersion: number }[] = await db('seat as s').join('occurrence as o', 'o.id', 's.occurrenceId').where({ localDate }).select('s.id', 's.rowVersion');
  const marked = await markAttendance({ seatId: seat!.id, attendance: 'away_with_notice', minutesLate: null, toldAt: null, toldVia: 'desk', rowVersion: seat!.rowVersion }, context);
  return marked.attendance;
}

it('who took a lesson over marks it on its day, and is told so on every other', async () => {
  const leo = await teacher('leo');
  expect(await mark(DAYS[1], leo)).toBe('away_with_notice');
  for (const day of [DAYS[0], DAYS[2]]) await expect(mark(day, leo)).rejects.toMatchObject({ code: 'forbidden', message: 'A lesson you took over is marked on its own day. The front desk can put it right for you.' });
});
it('the lesson stays its teacher’s to mark while a colleague takes it, and the lead marks any', async () => {
  for (const context of [await teacher('mara'), await teacher('ines', true)]) for (const day of DAYS) expect(await mark(day, context)).toBe('away_with_notice');
});
it('a lead without the office of lead, and a colleague, do not learn that the lesson is there', async () => {
  await expect(mark(DAYS[1], await teacher('ines'))).rejects.toMatchObject({ code: 'not_found' });
});
it('one’s own lesson, marked as taught by oneself, is no cover', async () => {
  await db('occurrence').update({ taughtById: 'mara' });
  expect(await mark(DAYS[0], await teacher('mara'))).toBe('away_with_notice');
});
