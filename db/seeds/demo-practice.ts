import { finishPractice } from '@/lib/ladder/server/finish-practice';
import { ladderOfStudent } from '@/lib/ladder/server/ladder-of-student';
import { setPractice } from '@/lib/ladder/server/set-practice';
import type { Context } from '@/lib/server/context';
import { addDays, instantOf } from '@/lib/time';
import { abilityFor, type Actor } from '@/policies/ability';
import { findRung, liveEdition } from '../ladders';
import { ownerAt, teacherAt } from './demo-context';
import { demoSlots, type DemoSlot } from './demo-lessons';
import type { House } from './demo-types';
import { between } from './random';

const SET_DAYS_AGO = 3;
const NEXT_LESSON_DAYS = 4;
const DAYS_BACK = 12;
/** Every so many students practise with this page; the two with an account of their own do. */
const EVERY = 6;
const WORDS = ['No key sticks out.', 'Slow enough that nothing is wrong.', 'The top note sings.'] as const;

/** What some students were given to practise, and the minutes they kept in the last two weeks: days of rest included. */
export async function layPractice(house: House): Promise<void> {
  for (const [at, slot] of demoSlots(house).entries()) {
    if (slot.student.key !== 'ada' && slot.student.key !== 'theo' && at % EVERY !== 0) continue;
    await giveSet(house, slot);
    await keepMinutes(house, slot);
  }
}

async function giveSet(house: House, { student, teacherId }: DemoSlot): Promise<void> {
  const { db, random, today, zone } = house;
  const context = teacherAt(house, teacherId, [student.id], instantOf(addDays(today, -SET_DAYS_AGO), 17 * 60, zone));
  const ladder = await ladderOfStudent(student.id, context);
  const edition = await liveEdition(db);
  const rung = ladder?.next[0] && edition ? await findRung(db, edition.id, ladder.next[0]) : undefined;
  if (!rung) return;
  const item = { rungId: rung.id, piece: '', keys: rung.keyPool.slice(0, 3), beatsPerMinute: rung.criteria.tempo?.beatsPerMinute ?? null, minutes: between(random, 2, 4) * 5, howRight: WORDS[between(random, 0, WORDS.length - 1)] ?? '' };
  await setPractice({ studentId: student.id, dueOn: addDays(today, NEXT_LESSON_DAYS), items: [item] }, context);
}

async function keepMinutes(house: House, { student }: DemoSlot): Promise<void> {
  const { random, today, zone } = house;
  for (let ago = DAYS_BACK; ago >= 1; ago -= 1) {
    if (random() < 0.4) continue;
    const context = studentAt(house, student.id, instantOf(addDays(today, -ago), 18 * 60 + between(random, 0, 60), zone));
    await finishPractice({ studentId: student.id, kind: 'ahead', itemId: 'demo', minutes: between(random, 1, 5) * 5, how: 'timed', feeling: null, note: '', played: [] }, context);
  }
}

function studentAt(house: House, personId: string, now: number): Context {
  const actor: Actor = { userId: `demo-${personId}`, personId, role: 'student', isLead: false, studentIds: [personId], payerIds: [], familyIds: [], taughtStudentIds: [], coveredTodayIds: [] };
  return { ...ownerAt(house, now), actor, ability: abilityFor(actor) };
}
