import 'server-only';
import type { Trx } from '@/db/connection';
import { insertSeries } from '@/db/enrolments';
import type { LessonType } from '@/db/lesson-types';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { weekdayOf, type LocalDate } from '@/lib/time';
import { placeBooking, writeBooking } from './place-booking';

export type SeriesPlan = {
  lessonType: LessonType; subjectId: string; level: number | null; title: string; termId: string; teacherId: string; roomId: string; siteId: string; zone: string;
  startMin: number; lengthMinutes: number; dates: readonly LocalDate[];
  /** Students with their enrolments; a class has several. */
  seats: readonly { studentId: string; enrolmentId: string }[];
};

/**
 * Writes a weekly series with a lesson on each of its dates. With `checked` every rule is asked for every date and
 * one breach refuses the whole; without, only the database's own guard stands (for a past that is laid as it was).
 */
export async function writeSeries(trx: Trx, context: Pick<Context, 'actor'>, plan: SeriesPlan, { checked }: { checked: boolean }): Promise<string> {
  const id = newId();
  const { dates, seats, lessonType, level, ...place } = plan;
  const [firstOn, lastOn] = [dates[0], dates.at(-1)];
  if (!firstOn || !lastOn) throw new RangeError('a series needs at least one date');
  await insertSeries(trx, { ...place, id, lessonTypeId: lessonType.id, weekday: weekdayOf(firstOn), firstOn, lastOn });
  const put = checked ? placeBooking : writeBooking;
  const enrolmentOf = new Map(seats.map(({ studentId, enrolmentId }) => [studentId, enrolmentId]));
  for (const localDate of dates) {
    await put(trx, context, { ...place, lessonType, level, localDate, seriesId: id, enrolmentOf, studentIds: seats.map(({ studentId }) => studentId), mode: 'in_room', source: 'roster' });
  }
  return id;
}
