import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import { lessonTypeByCode } from '@/db/lesson-types';
import { findPerson } from '@/db/people';
import { findRoom } from '@/db/rooms';
import { allSubjects } from '@/db/lesson-types';
import { transaction } from '@/db/transaction';
import { AppError, notFound } from '@/lib/errors';
import { formatDate, formatTimeRange } from '@/lib/format';
import type { Context } from '@/lib/server/context';
import { minuteOfClock } from '@/lib/time';
import { assertCan } from '@/policies/ability';
import type { bookSchema } from '../schema';
import { placeBooking } from './place-booking';

const WITH_STUDENT = ['single', 'make_up'];

/** One booking made at the desk. The same rules as everywhere; the notes are soft ones that were passed over knowingly. */
export async function bookByHand(input: z.output<typeof bookSchema>, context: Context): Promise<{ occurrenceId: string; notes: string[] }> {
  const { db, school } = context;
  assertCan(context.ability, 'create', 'Occurrence', {});
  const startMin = minuteOfClock(input.start);
  if (startMin === null) throw new AppError('invalid', 'This time does not exist.', { start: ['Enter a time like 16:30.'] });
  const needsStudent = WITH_STUDENT.includes(input.lessonTypeCode);
  if (needsStudent && !input.studentId) throw new AppError('invalid', 'A lesson needs a student.', { studentId: ['Choose a student.'] });
  if (needsStudent && !input.teacherId) throw new AppError('invalid', 'A lesson needs a teacher.', { teacherId: ['Choose a teacher.'] });
  if (!needsStudent && input.title === '') throw new AppError('invalid', 'Say what it is.', { title: ['Enter a few words, such as who rents the room.'] });
  const [room, lessonType, subjects] = [await findRoom(db, input.roomId), await lessonTypeByCode(db, input.lessonTypeCode), await allSubjects(db)];
  if (!room) throw notFound('room');
  if (input.studentId && !(await findPerson(db, input.studentId))) throw notFound('student');
  return transaction(db, async (trx) => {
    const { id, notes } = await placeBooking(trx, context, {
      lessonType, subjectId: needsStudent ? (subjects[0]?.id ?? null) : null, level: null, title: needsStudent ? '' : input.title, siteId: room.siteId, roomId: room.id, teacherId: input.teacherId,
      studentIds: needsStudent && input.studentId ? [input.studentId] : [], mode: 'in_room', localDate: input.localDate, startMin, lengthMinutes: input.lengthMinutes, zone: room.zone, source: 'drop_in',
    });
    await recordAudit(trx, context, { action: 'book', tableName: 'occurrence', rowId: id, sentence: `Booked ${room.name}: ${formatDate(input.localDate, school.locale, 'short')}, ${formatTimeRange(startMin, input.lengthMinutes)}.` });
    return { occurrenceId: id, notes: notes.map(({ sentence }) => sentence) };
  });
}
