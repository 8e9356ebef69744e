'use client';

import { useRouter } from 'next/navigation';
import { Sheet } from '@/components/ui/sheet';
import { EmptyState } from '@/components/ui/states';
import type { RegisterRow } from '@/db/register';
import { formatDate, formatTimeRange } from '@/lib/format';
import { AttendanceButtons } from '@/components/attendance/attendance-buttons';
import { mark } from '../../today/actions';

export function RegisterList({ rows, locale, showsTeacher }: { rows: readonly RegisterRow[]; locale: string; showsTeacher: boolean }) {
  const router = useRouter();
  if (rows.length === 0) return <Sheet flush><EmptyState title="Nothing to mark">Lessons that end without a mark appear here the next day.</EmptyState></Sheet>;
  return (
    <ul className="sheet" aria-label="Lessons without a mark">
      {rows.map((row) => (
        <li key={row.seatId} className="flex flex-wrap items-center justify-between gap-3 border-b border-rule px-4 py-3 last:border-b-0">
          <div>
            <p className="font-semibold">{row.studentName}</p>
            <p className="text-small text-ink-3">{formatDate(row.localDate, locale, 'short')}, {formatTimeRange(row.startMin, row.lengthMinutes)}{row.roomName ? `, ${row.roomName}` : ''}{showsTeacher && row.teacherName ? `, ${row.teacherName}` : ''}</p>
          </div>
          <AttendanceButtons mark={mark} seat={{ id: row.seatId, attendance: row.attendance, rowVersion: row.rowVersion, studentName: row.studentName }} onChange={() => router.refresh()} />
        </li>
      ))}
    </ul>
  );
}
