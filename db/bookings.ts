import type { Booking } from '@/lib/calendar/clash';
import type { Span } from '@/lib/time';
import type { Db } from './connection';
import { LIVE_STATES } from './occurrences';

type OccurrenceBooking = {
  id: string; startsAt: number; endsAt: number; siteId: string; roomId: string | null; teacherId: string | null; title: string; typeLabel: string;
  teacherName: string | null; students: string | null;
};
type OtherBooking = { startsAt: number; endsAt: number; siteId: string; roomId: string | null; teacherId: string | null; studentId: string | null; label: string };

export type KnownBooking = Booking & { occurrenceId: string | null };

/** Everything that takes a room, a teacher or a student within the span: lessons, held openings, maintenance, rentals. */
export async function bookingsTouching(db: Db, span: Span): Promise<KnownBooking[]> {
  return [...(await lessonBookings(db, span)), ...(await heldBookings(db, span)), ...(await roomBookings(db, span))];
}

async function lessonBookings(db: Db, span: Span): Promise<KnownBooking[]> {
  const rows: OccurrenceBooking[] = await db('occurrence as o').join('lesson_type as t', 't.id', 'o.lessonTypeId')
    .leftJoin('person as p', db.raw('p.id = coalesce(o.taught_by_id, o.planned_teacher_id)'))
    .where('o.startsAt', '<', span.endsAt).where('o.startsAt', '>', span.startsAt - 86_400).where('o.endsAt', '>', span.startsAt)
    .whereIn('o.state', LIVE_STATES)
    .select('o.id', 'o.startsAt', 'o.endsAt', 'o.siteId', 'o.roomId', 'o.title', 't.label as typeLabel',
      db.raw('coalesce(o.taught_by_id, o.planned_teacher_id) AS teacher_id'), db.raw("trim(p.given_name || ' ' || p.family_name) AS teacher_name"),
      db.raw(`(SELECT group_concat(s.student_id || '|' || trim(coalesce(x.called_name, x.given_name) || ' ' || x.family_name), '~')
        FROM seat s JOIN person x ON x.id = s.student_id WHERE s.occurrence_id = o.id) AS students`));
  return rows.map((row) => {
    const students = (row.students?.split('~') ?? []).map((pair) => pair.split('|'));
    const names = students.map(([, name]) => name ?? '');
    return {
      occurrenceId: row.id, startsAt: row.startsAt, endsAt: row.endsAt, siteId: row.siteId, roomId: row.roomId, teacherId: row.teacherId,
      studentIds: students.map(([id]) => id ?? ''), label: labelOf(row, names),
    };
  });
}

function labelOf({ title, typeLabel, teacherName }: OccurrenceBooking, students: string[]): string {
  if (title !== '') return title;
  if (students.length === 1) return `${students[0]}${teacherName ? ` with ${teacherName}` : ''}`;
  return `${typeLabel.toLowerCase()}${teacherName ? ` with ${teacherName}` : ''}`;
}

async function heldBookings(db: Db, span: Span): Promise<KnownBooking[]> {
  const rows: OtherBooking[] = await db('hold as h').join('opening_offer as f', 'f.id', 'h.openingOfferId').leftJoin('enquiry as e', 'e.id', 'f.enquiryId')
    .where('h.isLive', 1).where('h.startsAt', '<', span.endsAt).where('h.startsAt', '>', span.startsAt - 86_400).where('h.endsAt', '>', span.startsAt)
    .groupBy('h.openingOfferId', 'h.startsAt')
    .select(db.raw('min(h.starts_at) AS starts_at'), db.raw('min(h.ends_at) AS ends_at'), 'f.siteId', 'f.roomId', 'f.teacherId', 'f.studentId',
      db.raw("'the opening held for ' || coalesce(e.student_name, 'another family') AS label"));
  return rows.map(toBooking);
}

async function roomBookings(db: Db, span: Span): Promise<KnownBooking[]> {
  const rows: OtherBooking[] = await db('hold as h').join('room as r', 'r.id', 'h.holderId').leftJoin('rental as n', 'n.id', 'h.rentalId')
    .leftJoin('maintenance as m', 'm.id', 'h.maintenanceId').where({ 'h.isLive': 1, 'h.holderKind': 'room' })
    .andWhere((query) => query.whereNotNull('h.rentalId').orWhereNotNull('h.maintenanceId'))
    .where('h.startsAt', '<', span.endsAt).where('h.startsAt', '>', span.startsAt - 86_400).where('h.endsAt', '>', span.startsAt)
    .select('h.startsAt', 'h.endsAt', 'r.siteId', 'r.id as roomId', db.raw('NULL AS teacher_id'), db.raw('NULL AS student_id'),
      db.raw("coalesce(n.renter_name, m.kind) AS label"));
  return rows.map(toBooking);
}

const toBooking = ({ studentId, ...row }: OtherBooking): KnownBooking => ({ ...row, occurrenceId: null, studentIds: studentId ? [studentId] : [] });
