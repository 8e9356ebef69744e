import { closedDatesFor, teachingDates } from '@/lib/calendar/term';
import { writeSeries } from '@/lib/calendar/server/write-series';
import { newId } from '@/lib/server/ids';
import { addDays, instantOf, type LocalDate } from '@/lib/time';
import type { Trx } from '../connection';
import { insertEnrolment, setEnrolmentSeries } from '../enrolments';
import { lessonTypeByCode, type LessonType } from '../lesson-types';
import { closuresBetween, type TermRow } from '../terms';
import { transaction } from '../transaction';
import { hoursOn } from './demo-house';
import type { DemoStudent, House } from './demo-types';
import { between, pick, type Random } from './random';

export type DemoSlot = { student: DemoStudent; teacherId: string; roomId: string; siteIndex: 0 | 1; weekday: number; startMin: number; lengthMinutes: number; enrolmentId: string | null };
type TeacherDay = { teacher: House['teachers'][number]; weekday: number; siteIndex: 0 | 1; roomId: string; nextMin: number; toMin: number };

/** Rooms by teacher and weekday: nobody shares one on the same day. */
function teacherDays({ teachers, rooms }: House): TeacherDay[] {
  const taken = new Set<string>();
  return teachers.flatMap((teacher) => Object.entries(teacher.days).map(([day, siteIndex]) => {
    const weekday = Number(day);
    const room = rooms.find(({ id, siteIndex: index }) => index === siteIndex && !taken.has(`${id}:${weekday}`));
    if (!room) throw new Error(`no room is left for ${teacher.givenName} on day ${weekday}`);
    taken.add(`${room.id}:${weekday}`);
    const { fromMin, toMin } = hoursOn(weekday);
    return { teacher, weekday, siteIndex, roomId: room.id, nextMin: fromMin, toMin };
  }));
}

const LENGTHS = [30, 30, 30, 45, 45, 60] as const;
const GAPS = [0, 0, 0, 15, 15, 30, 45] as const;

/** Everybody's weekly place, given once and kept over both terms. */
function weeklySlots(house: House): DemoSlot[] {
  const { random, students, today } = house;
  const days = teacherDays(house);
  const todayNo = new Date(`${today}T12:00:00Z`).getUTCDay() || 7;
  const greta = days.find(({ teacher, weekday }) => teacher.key === 'greta' && weekday === todayNo);
  return students.map((student) => {
    const lengthMinutes = student.key === 'ada' ? 45 : pick(random, LENGTHS);
    const fitting = days.filter((day) => day.teacher.levelTo > student.level && day.nextMin + lengthMinutes <= day.toMin && day.teacher.key !== (student.key === 'abena' ? 'kwame' : ''));
    const day = student.key === 'ada' || student.key === 'abena' ? greta : emptiest(fitting, random);
    if (!day) throw new Error(`no place is left for ${student.name}`);
    const slot = { student, teacherId: day.teacher.id, roomId: day.roomId, siteIndex: day.siteIndex, weekday: day.weekday, startMin: day.nextMin, lengthMinutes, enrolmentId: null };
    day.nextMin += lengthMinutes + pick(random, GAPS);
    return slot;
  });
}

/** One of the four least filled days, so that the week fills evenly and not like clockwork. */
function emptiest(days: TeacherDay[], random: Random): TeacherDay | undefined {
  const sorted = [...days].sort((a, b) => a.nextMin - hoursOn(a.weekday).fromMin - (b.nextMin - hoursOn(b.weekday).fromMin));
  return sorted[between(random, 0, Math.min(3, sorted.length - 1))];
}

const slotsOf = new WeakMap<House, DemoSlot[]>();
export function demoSlots(house: House): DemoSlot[] {
  const slots = slotsOf.get(house) ?? weeklySlots(house);
  slotsOf.set(house, slots);
  return slots;
}

export async function layTerm(house: House, { term, until }: { term: TermRow; until: LocalDate }): Promise<void> {
  const closures = await closuresBetween(house.db, term.startsOn, term.endsOn);
  const lessonType = await lessonTypeByCode(house.db, 'single');
  for (const slot of demoSlots(house)) {
    const closed = closedDatesFor(closures, house.siteIds[slot.siteIndex], slot.startMin, slot.lengthMinutes);
    const dates = teachingDates(slot.weekday, term, closed);
    await transaction(house.db, (trx) => laySlot(trx, house, { slot, term, dates, lessonType }));
  }
  await markPast(house, term, until);
}

type Lay = { slot: DemoSlot; term: TermRow; dates: LocalDate[]; lessonType: LessonType };

async function laySlot(trx: Trx, house: House, { slot, term, dates, lessonType }: Lay): Promise<void> {
  const siteId = house.siteIds[slot.siteIndex];
  if (slot.enrolmentId === null) {
    slot.enrolmentId = newId();
    await insertEnrolment(trx, {
      id: slot.enrolmentId, studentId: slot.student.id, familyId: slot.student.familyId, subjectId: house.subjectId, lessonTypeId: lessonType.id, seriesId: null,
      lengthMinutes: slot.lengthMinutes, teacherId: slot.teacherId, siteId, tuitionModel: 'per_term_count', unitPriceMinor: null, startsOn: term.startsOn, endsOn: null,
      state: 'active', acceptedAt: house.now - 200 * 86_400, termsVersion: 'school-terms', createdBy: house.owner.actor.personId,
    });
  }
  const plan = {
    lessonType, subjectId: house.subjectId, level: slot.student.level, title: '', termId: term.id, teacherId: slot.teacherId, roomId: slot.roomId, siteId, zone: house.zone,
    startMin: slot.startMin, lengthMinutes: slot.lengthMinutes, dates, seats: [{ studentId: slot.student.id, enrolmentId: slot.enrolmentId }],
  };
  await setEnrolmentSeries(trx, slot.enrolmentId, await writeSeries(trx, house.owner, plan, { checked: false }));
}

/** Marks what has been taught as a school's register looks: mostly here, some late, some away. Two lessons of yesterday wait for their mark. */
async function markPast({ db, random, now, today, zone }: House, term: TermRow, until: LocalDate): Promise<void> {
  const rows: { id: string; seatId: string; startsAt: number; endsAt: number; teacherId: string; localDate: LocalDate }[] = await db('occurrence as o').join('seat as s', 's.occurrenceId', 'o.id')
    .whereBetween('o.localDate', [term.startsOn, until]).where('o.endsAt', '<=', now).where('s.attendance', 'expected')
    .select('o.id', 's.id as seatId', 'o.startsAt', 'o.endsAt', 'o.plannedTeacherId as teacherId', 'o.localDate').orderBy('o.startsAt');
  const recent = rows.filter(({ localDate }) => localDate < today && localDate >= addDays(today, -5));
  const unmarked = new Set(recent.slice(-2).map(({ seatId }) => seatId));
  await transaction(db, async (trx) => {
    for (const row of rows) {
      if (unmarked.has(row.seatId)) continue;
      const attendance = drawAttendance(random);
      const isTold = attendance === 'away_with_notice' || attendance === 'late_notice';
      const toldAt = attendance === 'away_with_notice' ? row.startsAt - 30 * 3600 : row.startsAt - 3 * 3600;
      await trx('seat').where({ id: row.seatId }).update({
        attendance, markedById: row.teacherId, markedAt: row.endsAt, rowVersion: 2, minutesLate: attendance === 'late' ? 10 : null,
        arrivedAt: attendance === 'present' || attendance === 'late' ? row.startsAt - 120 : null,
        toldAt: isTold ? toldAt : null, toldVia: isTold ? 'phone' : null,
      });
      const isTaught = attendance === 'present' || attendance === 'late';
      await trx('occurrence').where({ id: row.id }).update({ state: isTaught ? 'taught' : 'not_taught' });
    }
    // Those who should be in a room by now have been seen at the desk, all but one.
    const started = await trx('seat as s').join('occurrence as o', 'o.id', 's.occurrenceId').where('o.startsAt', '<=', now).where('o.endsAt', '>', now)
      .where('o.startsAt', '>=', instantOf(today, 0, zone)).select<{ id: string }[]>('s.id');
    for (const { id } of started.slice(1)) await trx('seat').where({ id }).update({ arrivedAt: now - 300 });
  });
}

function drawAttendance(random: Random): 'present' | 'late' | 'away_with_notice' | 'late_notice' | 'no_show' {
  const draw = random();
  if (draw < 0.875) return 'present';
  if (draw < 0.91) return 'late';
  if (draw < 0.955) return 'away_with_notice';
  return draw < 0.98 ? 'late_notice' : 'no_show';
}
