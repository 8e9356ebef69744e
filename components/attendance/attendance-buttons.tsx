'use client';

import { useState, useTransition } from 'react';
import { toast } from 'sonner';
import { Chip } from '@/components/ui/chip';
import { ATTENDANCE_WORDS, isTaught, type MarkedAttendance } from '@/lib/calendar/attendance';
import type { BoardSeat } from '@/lib/calendar/server/day-board';
import type { MarkAction } from './mark-action';

const FIRST: { attendance: MarkedAttendance; label: string }[] = [
  { attendance: 'present', label: 'Here' }, { attendance: 'late', label: 'Late' }, { attendance: 'away_with_notice', label: 'Away' }, { attendance: 'no_show', label: 'Did not come' },
];
const MORE: { attendance: MarkedAttendance; label: string }[] = [{ attendance: 'online', label: 'Joined online' }, { attendance: 'left_early', label: 'Left early' }, { attendance: 'teacher_away', label: 'Teacher away' }];

type AttendanceButtonsProps = { mark: MarkAction; seat: Pick<BoardSeat, 'id' | 'attendance' | 'rowVersion' | 'studentName'>; onChange: () => void };

/** One press marks the lesson; what follows from it is said at once. The deadline decides whether "away" was told in time. */
export function AttendanceButtons({ mark, seat, onChange }: AttendanceButtonsProps) {
  const [pending, startTransition] = useTransition();
  const [local, setLocal] = useState<{ attendance: BoardSeat['attendance']; rowVersion: number } | null>(null);
  const shown = local && local.rowVersion > seat.rowVersion ? local : { attendance: seat.attendance, rowVersion: seat.rowVersion };
  const press = (attendance: MarkedAttendance) => startTransition(async () => {
    const result = await mark({ seatId: seat.id, attendance, rowVersion: shown.rowVersion }).catch(() => null);
    if (result?.ok) {
      setLocal(result.data);
      if (result.data.sentence) toast(`${seat.studentName}: ${ATTENDANCE_WORDS[result.data.attendance]}. ${result.data.sentence}`);
    } else toast.error(result?.message ?? 'This did not reach the school. Press again.');
    onChange();
  });
  return (
    <div role="group" aria-label={`Attendance of ${seat.studentName}`} className="flex flex-wrap items-center gap-2">
      {FIRST.map(({ attendance, label }) => {
        const isOn = shown.attendance === attendance || (attendance === 'away_with_notice' && shown.attendance === 'late_notice');
        return (
          <button key={attendance} type="button" aria-pressed={isOn} disabled={pending} onClick={() => press(attendance)}
            className={`rounded border px-3 py-2 text-[14px] font-semibold leading-none tap ${isOn ? pressedClass(attendance) : 'border-rule-strong bg-sheet hover:bg-wash'}`}>
            {label}
          </button>
        );
      })}
      <select aria-label={`Other mark for ${seat.studentName}`} disabled={pending} value="" onChange={(event) => press(event.target.value as MarkedAttendance)} className="rounded border border-rule-strong bg-sheet px-2 py-[7px] text-[14px] tap">
        <option value="" disabled>Other…</option>
        {MORE.map(({ attendance, label }) => <option key={attendance} value={attendance}>{label}</option>)}
      </select>
      {shown.attendance === 'expected' ? null : <Chip tone={isTaught(shown.attendance) ? 'ok' : 'neutral'}>{ATTENDANCE_WORDS[shown.attendance]}</Chip>}
    </div>
  );
}

const pressedClass = (attendance: MarkedAttendance): string => {
  if (attendance === 'present') return 'border-felt bg-felt text-white';
  return attendance === 'no_show' ? 'border-brick bg-brick text-white' : 'border-brass bg-brass text-white';
};
