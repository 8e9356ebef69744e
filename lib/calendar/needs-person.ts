import { clockOf } from '../time';
import { plural } from '../format';

/** Something on today's list that a person has to see to, the most pressing first. */
export type NeedsPerson = { kind: 'not_arrived' | 'needs_cover' | 'unmarked' | 'enquiries' | 'mail_failed' | 'check_expires'; title: string; detail: string; href: string | null; action: string | null };

type LessonNow = {
  id: string; startsAt: number; endsAt: number; startMin: number; teacherName: string | null; state: string; isTaughtKind: boolean;
  seats: readonly { studentId: string; studentName: string; attendance: string; hasArrived: boolean }[];
};

/** Minutes after which a missing student is worth a call. */
export const LATE_MINUTES = 10;

/** Expected, begun ten minutes ago, and neither seen at the desk nor marked. */
export function notArrived(lessons: readonly LessonNow[], now: number): { lesson: LessonNow; studentId: string; studentName: string; minutesLate: number }[] {
  return lessons
    .filter(({ startsAt, endsAt, isTaughtKind }) => isTaughtKind && startsAt + LATE_MINUTES * 60 <= now && now < endsAt)
    .flatMap((lesson) => lesson.seats.filter(({ attendance, hasArrived }) => attendance === 'expected' && !hasArrived)
      .map(({ studentId, studentName }) => ({ lesson, studentId, studentName, minutesLate: Math.floor((now - lesson.startsAt) / 60) })));
}

type Counts = {
  lessons: readonly LessonNow[]; now: number; guardianLine: (studentId: string) => string;
  newEnquiries: readonly { studentName: string }[]; unmarked: readonly { teacherName: string; lessons: number }[]; failedMails: number;
  expiringChecks: readonly { name: string; daysLeft: number }[];
};

export function needsPersonList({ lessons, now, guardianLine, newEnquiries, unmarked, failedMails, expiringChecks }: Counts): NeedsPerson[] {
  const cover = lessons.filter(({ state }) => state === 'needs_cover');
  return [
    ...(cover.length > 0 ? [{ kind: 'needs_cover' as const, title: `${plural(cover.length, 'lesson')} without a teacher`, detail: cover.map(({ startMin, teacherName }) => `${clockOf(startMin)} ${teacherName ?? ''}`.trim()).join(', '), href: null, action: null }] : []),
    ...notArrived(lessons, now).map(({ studentId, studentName, minutesLate }) => ({
      kind: 'not_arrived' as const, title: `${studentName} not in after ${minutesLate} min`, detail: guardianLine(studentId), href: `/students/${studentId}`, action: 'Open student',
    })),
    ...(newEnquiries.length > 0 ? [{ kind: 'enquiries' as const, title: plural(newEnquiries.length, 'new enquiry', 'new enquiries'), detail: newEnquiries.map(({ studentName }) => studentName).join(', '), href: '/enquiries', action: 'Find an opening' }] : []),
    ...unmarked.map(({ teacherName, lessons: count }) => ({ kind: 'unmarked' as const, title: `${plural(count, 'lesson')} not marked`, detail: `${teacherName}: remind, or mark them for the teacher`, href: '/register', action: 'Open register' })),
    ...expiringChecks.map(({ name, daysLeft }) => ({ kind: 'check_expires' as const, title: `${name}: background check`, detail: daysLeft < 0 ? 'has run out: no lessons with students under 18' : `runs out in ${plural(daysLeft, 'day')}`, href: null, action: null })),
    ...(failedMails > 0 ? [{ kind: 'mail_failed' as const, title: plural(failedMails, 'mail') + ' could not be delivered', detail: 'Check the addresses.', href: null, action: null }] : []),
  ];
}
