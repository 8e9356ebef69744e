'use client';

import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { Find } from '@/components/shell/find';
import { ButtonLink } from '@/components/ui/button';
import { Chip } from '@/components/ui/chip';
import { PageHeader } from '@/components/ui/page-header';
import { EmptyState } from '@/components/ui/states';
import { useNow } from '@/components/ui/use-now';
import type { TeacherDay, TeacherLesson } from '@/lib/calendar/server/teacher-day';
import { formatTimeRange, plural } from '@/lib/format';
import { addDays } from '@/lib/time';
import { AttendanceButtons } from '@/components/attendance/attendance-buttons';
import { mark } from '../actions';
import type { Heading } from './desk-today-screen';

export function TeacherTodayScreen({ day, heading, now }: { day: TeacherDay; heading: Heading; now: number }) {
  const router = useRouter();
  const at = useNow() ?? now;
  const minutes = day.lessons.reduce((sum, { lengthMinutes }) => sum + lengthMinutes, 0);
  return (
    <div className="max-w-[860px]">
      <PageHeader title={heading.title} sub={`${plural(day.lessons.length, 'lesson')}, ${Math.floor(minutes / 60)} h ${minutes % 60} min.`} actions={<Find />} />
      <p className="mb-3 flex flex-wrap gap-3">
        <Link href={`/today?date=${addDays(heading.date, -1)}`} className="text-petrol">Day before</Link>
        {heading.isToday ? null : <Link href="/today" className="text-petrol">Today</Link>}
        <Link href={`/today?date=${addDays(heading.date, 1)}`} className="text-petrol">Day after</Link>
      </p>
      {day.unmarkedBefore > 0 ? (
        <p className="mb-4 flex flex-wrap items-center justify-between gap-3 rounded border border-brass bg-brass-wash px-4 py-3 text-brass">
          <span className="font-semibold">{plural(day.unmarkedBefore, 'earlier lesson')} not marked yet. They hold up your pay.</span>
          <ButtonLink href="/register">Mark them</ButtonLink>
        </p>
      ) : null}
      {day.lessons.length === 0 ? <div className="sheet"><EmptyState title="No lessons on this day">Enjoy it. The calendar shows what comes next.</EmptyState></div> : (
        <ol className="sheet">
          {day.lessons.map((lesson) => <LessonItem key={lesson.id} lesson={lesson} isNow={heading.isToday && lesson.startsAt <= at && at < lesson.endsAt} onChange={() => router.refresh()} />)}
        </ol>
      )}
    </div>
  );
}

function LessonItem({ lesson, isNow, onChange }: { lesson: TeacherLesson; isNow: boolean; onChange: () => void }) {
  return (
    <li className={`flex flex-col gap-3 border-b border-rule px-4 py-4 last:border-b-0 ${isNow ? 'border-l-4 border-l-brass-fill' : ''}`}>
      <p className="flex flex-wrap items-center gap-x-3 gap-y-1">
        <span className="num font-display text-h2 font-semibold">{formatTimeRange(lesson.startMin, lesson.lengthMinutes)}</span>
        <span className="text-ink-3">{lesson.roomName ?? 'online'}, {lesson.siteName}</span>
        {isNow ? <Chip tone="wait">now</Chip> : null}
        {lesson.lessonTypeCode === 'single' ? null : <Chip tone="info">{lesson.lessonTypeLabel}</Chip>}
      </p>
      {lesson.seats.map((seat) => (
        <div key={seat.id} className="flex flex-col gap-2">
          <div className="flex flex-wrap items-center justify-between gap-2">
            <Link href={`/students/${seat.studentId}`} className="text-lead font-semibold text-ink">{seat.studentName}</Link>
            <ButtonLink kind="brass" href={`/hearings/${seat.studentId}?lesson=${lesson.id}`}>Hear a rung</ButtonLink>
          </div>
          <AttendanceButtons mark={mark} seat={seat} onChange={onChange} />
        </div>
      ))}
      {lesson.seats.length === 0 ? <p className="text-ink-3">{lesson.title || lesson.lessonTypeLabel}</p> : null}
    </li>
  );
}
