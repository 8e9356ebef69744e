import { Chip } from '@/components/ui/chip';
import { Sheet } from '@/components/ui/sheet';
import type { UpcomingLesson } from '@/db/student-lists';
import { ATTENDANCE_WORDS, type Attendance } from '@/lib/calendar/attendance';
import { formatDate, formatTimeRange } from '@/lib/format';
import type { LocalDate } from '@/lib/time';

/** Four weeks back and four ahead. */
export function StudentLessons({ lessons, locale, today }: { lessons: readonly UpcomingLesson[]; locale: string; today: LocalDate }) {
  const coming = lessons.filter(({ localDate }) => localDate >= today);
  const past = lessons.filter(({ localDate }) => localDate < today).reverse();
  return (
    <div className="flex min-w-0 flex-col gap-4">
      <LessonSheet title="Coming lessons" lessons={coming} locale={locale} empty="No lesson in the next four weeks." />
      <LessonSheet title="Past lessons" lessons={past} locale={locale} empty="No lesson in the last four weeks." />
    </div>
  );
}

function LessonSheet({ title, lessons, locale, empty }: { title: string; lessons: readonly UpcomingLesson[]; locale: string; empty: string }) {
  return (
    <Sheet flush eyebrow={title}>
      {lessons.length === 0 ? <p className="px-4 pb-4 text-ink-3">{empty}</p> : (
        <ul>
          {lessons.map((lesson) => (
            <li key={lesson.seatId} className="flex flex-wrap items-center justify-between gap-2 border-t border-rule px-4 py-[10px]">
              <span><b className="num">{formatDate(lesson.localDate, locale, 'short')}, {formatTimeRange(lesson.startMin, lesson.lengthMinutes)}</b> <span className="text-ink-3">{lesson.roomName ?? 'online'}, {lesson.teacherName}</span></span>
              {lesson.attendance === 'expected' ? null : <Chip tone={lesson.attendance === 'present' ? 'ok' : 'neutral'}>{ATTENDANCE_WORDS[lesson.attendance as Attendance]}</Chip>}
            </li>
          ))}
        </ul>
      )}
    </Sheet>
  );
}
