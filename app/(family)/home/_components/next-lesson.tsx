import Link from 'next/link';
import type { UpcomingLesson } from '@/db/student-lists';
import { formatDate } from '@/lib/format';
import { clockOf, type LocalDate } from '@/lib/time';
import { AbsenceButton } from '../../lessons/_components/absence-button';

type NextLessonProps = { lesson: UpcomingLesson; today: LocalDate; locale: string; canReport: boolean; isReader: boolean; now: number };

export function NextLesson({ lesson, today, locale, canReport, isReader, now }: NextLessonProps) {
  const day = lesson.localDate === today ? 'today' : formatDate(lesson.localDate, locale, 'day');
  const title = `${isReader ? 'You' : lesson.studentName}, ${day} at ${clockOf(lesson.startMin)}`;
  return (
    <section>
      <p className="eyebrow">Next lesson</p>
      <h2 className="text-[21px]">{title}</h2>
      <p className="text-ink-3">{lesson.roomName ?? 'Online'} with {lesson.teacherName}, {lesson.lengthMinutes} min</p>
      <p className="mt-3 flex flex-wrap items-center gap-3">
        {canReport && lesson.startsAt > now ? <AbsenceButton seatId={lesson.seatId} what={title} /> : null}
        <Link href="/lessons" className="font-semibold text-petrol">All lessons</Link>
      </p>
    </section>
  );
}
