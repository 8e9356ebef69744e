import 'server-only';
import { checksExpiringBefore, countFailedMails, guardianLines, unmarkedByTeacher } from '@/db/desk';
import { listEnquiries } from '@/db/enquiries';
import type { Context } from '@/lib/server/context';
import { addDays, daysBetween, type LocalDate } from '@/lib/time';
import { may } from '@/policies/ability';
import { needsPersonList, type NeedsPerson } from '../needs-person';
import { dayBoard, type BoardLesson, type DayBoard } from './day-board';

export type DeskToday = {
  board: DayBoard; needs: NeedsPerson[]; summary: { lessons: number; trials: number; rehearsals: number; usedPercent: number | null };
};

const CHASED_DAYS = 42;
const EXPIRY_DAYS = 60;
/** The hours in which a school of this kind is full or empty. */
const BUSY_FROM_MIN = 15 * 60;

/** What the desk opens on: the day by rooms and what needs a person, the most pressing first. */
export async function deskToday({ date }: { date: LocalDate }, context: Context): Promise<DeskToday> {
  const board = await dayBoard({ date }, context);
  return { board, needs: date === context.today ? await needsOf(board, context) : [], summary: summaryOf(board) };
}

async function needsOf(board: DayBoard, context: Context): Promise<NeedsPerson[]> {
  const { db, now, today, ability } = context;
  const lessons = board.lessons.map((lesson) => ({ ...lesson, isTaughtKind: lesson.seats.length > 0 }));
  const expected = lessons.flatMap(({ seats }) => seats.filter(({ attendance }) => attendance === 'expected').map(({ studentId }) => studentId));
  const lines = await guardianLines(db, expected);
  const checks = may(ability, 'read', 'Account') ? await checksExpiringBefore(db, addDays(today, EXPIRY_DAYS)) : [];
  return needsPersonList({
    lessons, now, guardianLine: (id) => (lines.has(id) ? `Guardian: ${lines.get(id)}` : 'No guardian on record'),
    newEnquiries: await listEnquiries(db, ['new']), unmarked: await unmarkedByTeacher(db, today, addDays(today, -CHASED_DAYS)), failedMails: await countFailedMails(db),
    expiringChecks: checks.map(({ name, expiresOn }) => ({ name, daysLeft: daysBetween(today, expiresOn) })),
  });
}

function summaryOf({ lessons, rooms, openToMin }: DayBoard): DeskToday['summary'] {
  const count = (...codes: string[]) => lessons.filter(({ lessonTypeCode }) => codes.includes(lessonTypeCode)).length;
  const openMinutes = rooms.length * Math.max(0, openToMin - BUSY_FROM_MIN);
  return {
    lessons: count('single', 'group', 'make_up', 'workshop', 'ensemble', 'drop_in'), trials: count('trial'), rehearsals: count('rehearsal', 'recital'),
    usedPercent: openMinutes === 0 ? null : Math.round((usedMinutes(lessons) * 100) / openMinutes),
  };
}

const usedMinutes = (lessons: readonly BoardLesson[]): number =>
  lessons.filter(({ roomId }) => roomId !== null)
    .reduce((sum, { startMin, lengthMinutes }) => sum + Math.max(0, startMin + lengthMinutes - Math.max(startMin, BUSY_FROM_MIN)), 0);
