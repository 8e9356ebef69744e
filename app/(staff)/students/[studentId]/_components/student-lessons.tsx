import Link from 'next/link';
import { Chip } from '@/components/ui/chip';
import { Sheet } from '@/components/ui/sheet';
import type { UpcomingLesson } from '@/db/student-lists';
import { ATTENDANCE_WORDS, type Attendance } from '@/lib/calendar/attendance';
import { formatDate, formatTimeRange } from '@/lib/format';
import type { LocalDate } from '@/lib/time';

type LessonsProps = { lessons: readonly UpcomingLesson[]; locale: string; today: LocalDate };

/** The day, opened in the calendar at the teacher's week. */
const inCalendar = ({ localDate, teacherId }: UpcomingLesson): string => `/calendar?date=${localDate}${teacherId ? `&teacher=${teacherId}` : ''}`;
const where = ({ roomName, teacherName }: UpcomingLesson): string => [roomName ?? 'online', teacherName].filter(Boolean).join(', ');

export function NextLesson({ lessons, locale, today }: LessonsProps) {
  const next = lessons.find(({ localDate }) => localDate >= today);
  return (
    <Sheet eyebrow="Next lesson">
      {next ? <p><Link href={inCalendar(next)} className="num font-display text-h2 font-semibold text-ink tap">{`${next.localDate === today ? 'Today' : formatDate(next.localDate, locale, 'day')}, ${formatTimeRange(next.startMin, next.lengthMinutes)}`}</Link> <span className="text-ink-3">{where(next)}</span></p>
        : <p className="text-ink-3">No lesson in the next four weeks.</p>}
    </Sheet>
  );
}

/** Four weeks ahead. */
export function ComingLessons({ lessons, locale, today }: LessonsProps) {
  return <LessonSheet title="Coming lessons" lessons={lessons.filter(({ localDate }) => localDate >= today)} locale={locale} empty="No lesson in the next four weeks." />;
}

/** Four weeks back, the latest first. */
export function PastLessons({ lessons, locale, today }: LessonsProps) {
  return <LessonSheet title="Past lessons" lessons={lessons.filter(({ localDate }) => localDate < today).reverse()} locale={locale} empty="No lesson in the last four weeks." />;
}

function LessonSheet({ title, lessons, locale, empty }: { title: string; lessons: readonly UpcomingLesson[]; locale: string; empty: string }) {
  return (
    <Sheet flush eyebrow={title}>
      {lessons.length === 0 ? <p className="px-4 pb-4 text-ink-3">{empty}</p> : (
        <ul>
          {lessons.map((lesson) => (
            <li key={lesson.seatId} className="flex flex-wrap items-center justify-between gap-2 border-t border-rule px-4 py-[10px]">
              <span className="min-w-0"><Link href={inCalendar(lesson)} className="num font-bold text-ink no-underline hover:underline tap">{`${formatDate(lesson.localDate, locale, 'short')}, ${formatTimeRange(lesson.startMin, lesson.lengthMinutes)}`}</Link> <span className="text-ink-3">{where(lesson)}</span></span>
              {lesson.attendance === 'expected' ? null : <Chip tone={lesson.attendance === 'present' ? 'ok' : 'neutral'}>{ATTENDANCE_WORDS[lesson.attendance as Attendance]}</Chip>}
            </li>
          ))}
        </ul>
      )}
    </Sheet>
  );
}
