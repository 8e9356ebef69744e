import type { Attendance, MarkedAttendance } from '@/lib/calendar/attendance';

/** The server action that marks a seat, handed in by the screen: shared parts know no screen's actions. */
export type MarkAction = (input: { seatId: string; attendance: MarkedAttendance; rowVersion: number }) => Promise<
  { ok: true; data: { attendance: Attendance; rowVersion: number; sentence: string } } | { ok: false; message: string }
>;
