'use client';

import { useQueryClient } from '@tanstack/react-query';
import Link from 'next/link';
import { deskTodayKey } from '@/components/queries/use-desk-today';
import { Chip } from '@/components/ui/chip';
import { Dialog } from '@/components/ui/dialog';
import type { BoardLesson, BoardSeat } from '@/lib/calendar/server/day-board';
import { formatTimeRange } from '@/lib/format';
import type { LocalDate } from '@/lib/time';
import { AttendanceButtons } from '@/components/attendance/attendance-buttons';
import { mark } from '../actions';
import { CheckInButton } from './check-in-button';

type LessonDrawerProps = { lesson: BoardLesson; date: LocalDate; onClose: () => void };

/** Everything about one lesson at hand: who, where, in or not in, and the mark. */
export function LessonDrawer({ lesson, date, onClose }: LessonDrawerProps) {
  const client = useQueryClient();
  const refresh = () => void client.invalidateQueries({ queryKey: deskTodayKey(date) });
  const title = lesson.title || (lesson.seats.length === 1 ? lesson.seats[0]?.studentName : lesson.lessonTypeLabel) || lesson.lessonTypeLabel;
  return (
    <Dialog open onOpenChange={(open) => { if (!open) onClose(); }} side="right" title={title} description={`${formatTimeRange(lesson.startMin, lesson.lengthMinutes)}, ${lesson.roomName ?? 'online'}${lesson.teacherName ? `, ${lesson.teacherName}` : ''}`}>
      <p className="mb-3 flex gap-2"><Chip tone={lesson.lessonTypeCode === 'trial' ? 'wait' : 'neutral'}>{lesson.lessonTypeLabel}</Chip>{lesson.mode === 'online' ? <Chip tone="info">online</Chip> : null}</p>
      {lesson.seats.length === 0 ? <p className="text-ink-3">No students in this booking.</p> : (
        <ul>{lesson.seats.map((seat) => <SeatRow key={seat.id} seat={seat} onChange={refresh} />)}</ul>
      )}
    </Dialog>
  );
}

function SeatRow({ seat, onChange }: { seat: BoardSeat; onChange: () => void }) {
  return (
    <li className="flex flex-col gap-2 border-b border-rule py-4 first:pt-0 last:border-b-0">
      <div className="flex items-center justify-between gap-3">
        <Link href={`/students/${seat.studentId}`} className="font-semibold text-ink">{seat.studentName}</Link>
        {seat.attendance === 'expected' ? <CheckInButton seat={seat} onChange={onChange} /> : null}
      </div>
      <AttendanceButtons mark={mark} seat={seat} onChange={onChange} />
    </li>
  );
}
