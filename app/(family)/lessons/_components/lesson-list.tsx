import { Chip } from '@/components/ui/chip';
import { Sheet } from '@/components/ui/sheet';
import { EmptyState } from '@/components/ui/states';
import type { UpcomingLesson } from '@/db/student-lists';
import { ATTENDANCE_WORDS, type Attendance } from '@/lib/calendar/attendance';
import { formatDate, formatInstant, formatTimeRange } from '@/lib/format';
import type { LocalDate } from '@/lib/time';
import { AbsenceButton } from './absence-button';

type LessonListProps = {
  lessons: readonly UpcomingLesson[]; credits: readonly { studentName: string; minutes: number; lastOn: LocalDate }[]; today: LocalDate; now: number; locale: string; zone: string; showsName: boolean; canReport: boolean;
};

export function LessonList({ lessons, credits, today, now, locale, zone, showsName, canReport }: LessonListProps) {
  const coming = lessons.filter(({ startsAt }) => startsAt > now);
  const past = lessons.filter(({ startsAt, localDate }) => startsAt <= now && localDate <= today).reverse();
  const titleOf = (lesson: UpcomingLesson) => `${showsName ? `${lesson.studentName}, ` : ''}${formatDate(lesson.localDate, locale, 'short')}, ${formatTimeRange(lesson.startMin, lesson.lengthMinutes)}`;
  return (
    <div className="flex flex-col gap-4">
      {credits.length > 0 ? (
        <Sheet eyebrow="Lessons to make up">
          <ul>{credits.map(({ studentName, minutes, lastOn }) => <li key={studentName + lastOn} className="num">{showsName ? `${studentName}: ` : ''}{minutes} minutes, by {formatDate(lastOn, locale, 'day')}. Ring the school to choose a time.</li>)}</ul>
        </Sheet>
      ) : null}
      <Sheet flush eyebrow="Coming">
        {coming.length === 0 ? <EmptyState title="No lessons planned">When the next term is published its lessons appear here.</EmptyState> : (
          <ul>
            {coming.map((lesson) => (
              <li key={lesson.seatId} className="flex flex-wrap items-center justify-between gap-3 border-t border-rule px-4 py-3">
                <div>
                  <p className="num font-semibold">{titleOf(lesson)}</p>
                  <p className="text-small text-ink-3">{lesson.roomName ?? 'online'}, {lesson.siteName}, with {lesson.teacherName}</p>
                  {lesson.attendance === 'expected' && lesson.cancelDeadlineAt !== null && lesson.cancelDeadlineAt > now ? <p className="text-small text-ink-3">To cancel in good time: by {formatInstant(lesson.cancelDeadlineAt, { locale, zone })}</p> : null}
                </div>
                {lesson.attendance === 'expected' ? (canReport ? <AbsenceButton seatId={lesson.seatId} what={titleOf(lesson)} /> : null) : <Chip>{ATTENDANCE_WORDS[lesson.attendance as Attendance]}</Chip>}
              </li>
            ))}
          </ul>
        )}
      </Sheet>
      {past.length > 0 ? (
        <Sheet flush eyebrow="The last four weeks">
          <ul>
            {past.map((lesson) => (
              <li key={lesson.seatId} className="flex flex-wrap items-center justify-between gap-3 border-t border-rule px-4 py-[10px]">
                <span className="num">{titleOf(lesson)}</span>
                <Chip tone={lesson.attendance === 'present' ? 'ok' : 'neutral'}>{lesson.attendance === 'expected' ? 'not marked yet' : ATTENDANCE_WORDS[lesson.attendance as Attendance]}</Chip>
              </li>
            ))}
          </ul>
        </Sheet>
      ) : null}
    </div>
  );
}
