import 'server-only';
import { insertEnrolment, insertSeries } from '@/db/enrolments';
import { familyOfStudent } from '@/db/families';
import { insertHolds, isHoldOverlap } from '@/db/holds';
import { insertOccurrence, insertSeats } from '@/db/occurrences';
import { cancelDeadlineOf, spanOf } from '@/lib/calendar/lesson-time';
import { AppError } from '@/lib/errors';
import type { LocalDate } from '@/lib/time';
import type { EnrolmentFacts } from '../rows';
import { datesOf } from '../weekly-slots';
import { idBehind, makeId, type ImportRun, type Place } from './import-run';

type Weekly = { facts: EnrolmentFacts; place: Place; seriesId: string; enrolmentId: string; studentId: string; teacherId: string; roomId: string };

/** An enrolment with its weekly lessons to the end of the term, at the agreed price, exactly where the old books had it. */
export async function writeEnrolment(run: ImportRun, facts: EnrolmentFacts, place: Place): Promise<string> {
  const { trx, context, site, plan, lessonType, keyboard } = run;
  const [studentId, teacherId, roomId] = [idBehind(run, facts.student), idBehind(run, facts.teacher), idBehind(run, facts.room)];
  const dates = datesOf(facts, plan);
  const [firstOn, lastOn] = [dates[0], dates.at(-1)];
  const family = await familyOfStudent(trx, studentId);
  if (!firstOn || !lastOn || !family) throw new AppError('conflict', 'The school has changed since this workbook was checked. Check it again.');
  const seriesId = makeId(run, 'series', place);
  const where = { teacherId, roomId, siteId: site.id, zone: site.zone, startMin: facts.startMin, lengthMinutes: facts.lengthMinutes };
  await insertSeries(trx, { id: seriesId, lessonTypeId: lessonType.id, subjectId: keyboard.id, ...where, weekday: facts.weekday, firstOn, lastOn, termId: run.termId });
  const enrolmentId = makeId(run, 'enrolment', place);
  await insertEnrolment(trx, {
    id: enrolmentId, studentId, familyId: family.id, subjectId: keyboard.id, lessonTypeId: lessonType.id, seriesId, lengthMinutes: facts.lengthMinutes, teacherId, siteId: site.id,
    tuitionModel: 'per_term_count', unitPriceMinor: facts.priceMinor, startsOn: facts.startsOn ?? firstOn, endsOn: null, state: 'active', acceptedAt: context.now,
    termsVersion: 'import', externalKey: place.key, createdBy: context.actor.personId,
  });
  for (const localDate of dates) await writeLesson(run, localDate, { facts, place, seriesId, enrolmentId, studentId, teacherId, roomId });
  return enrolmentId;
}

/** Written as it is: the rules of new bookings were another school's decision once; only a double booking is refused. */
async function writeLesson(run: ImportRun, localDate: LocalDate, weekly: Weekly): Promise<void> {
  const { trx, context, site, lessonType, keyboard } = run;
  const { facts, place, seriesId, enrolmentId, studentId, teacherId, roomId } = weekly;
  const time = { localDate, startMin: facts.startMin, lengthMinutes: facts.lengthMinutes, zone: site.zone };
  const [id, span] = [makeId(run, 'occurrence', place), spanOf(time)];
  await insertOccurrence(trx, {
    id, ...span, ...time, seriesId, lessonTypeId: lessonType.id, subjectId: keyboard.id, title: '', siteId: site.id, roomId, plannedTeacherId: teacherId, mode: 'in_room',
    cancelDeadlineAt: cancelDeadlineOf(time), createdBy: context.actor.personId,
  });
  await insertSeats(trx, [{ id: makeId(run, 'seat', place), occurrenceId: id, studentId, enrolmentId, source: 'roster' }]);
  try {
    await insertHolds(trx, [{ holderKind: 'teacher', holderId: teacherId, ...span }, { holderKind: 'room', holderId: roomId, ...span }, { holderKind: 'student', holderId: studentId, ...span }], { occurrenceId: id });
  } catch (error) {
    if (isHoldOverlap(error)) throw new AppError('conflict', `Row ${place.rowNo} of ${place.sheet} meets a booking that was made meanwhile. Check the workbook again.`);
    throw error;
  }
}
