import type { BoardLesson, BoardRoom } from '@/lib/calendar/server/day-board';

/** Height of an hour on the board. */
export const HOUR_PX = 123;
const px = (minutes: number) => (minutes * HOUR_PX) / 60;

/** The hours shown: from the hour in which the first thing begins to the end of the last; at least four hours. */
export function boardHours(lessons: readonly BoardLesson[], openFromMin: number, openToMin: number): { fromMin: number; toMin: number; hours: number[] } {
  const starts = lessons.map(({ startMin }) => startMin);
  const ends = lessons.map(({ startMin, lengthMinutes }) => startMin + lengthMinutes);
  const first = starts.length > 0 ? Math.min(...starts) : Math.max(openFromMin, 13 * 60);
  const last = ends.length > 0 ? Math.max(...ends) : openToMin;
  const fromMin = Math.floor(first / 60) * 60;
  const toMin = Math.max(fromMin + 240, Math.ceil(last / 60) * 60);
  return { fromMin, toMin, hours: Array.from({ length: (toMin - fromMin) / 60 }, (_, index) => fromMin / 60 + index) };
}

export const blockStyle = ({ startMin, lengthMinutes }: BoardLesson, fromMin: number) => ({ top: px(startMin - fromMin) + 1, height: Math.max(22, px(lengthMinutes) - 3) });
export const offsetOf = (minute: number, fromMin: number) => px(minute - fromMin);

/** Rooms in which something happens or that belong to the chosen site; an unused hall is left out when the board is full. */
export const roomsOfSite = (rooms: readonly BoardRoom[], siteId: string | null): BoardRoom[] => rooms.filter((room) => siteId === null || room.siteId === siteId);

export const blockTitle = ({ title, seats, lessonTypeCode, lessonTypeLabel }: BoardLesson): string => {
  if (title !== '') return title;
  const name = seats.length === 1 ? (seats[0]?.studentName ?? '') : `${lessonTypeLabel}, ${seats.length}`;
  return lessonTypeCode === 'trial' ? `Trial: ${name}` : name;
};

const lastWord = (name: string) => name.split(' ').at(-1) ?? name;

export const blockDetail = ({ teacherName, coverName, lessonTypeCode, lessonTypeLabel, mode }: BoardLesson): string => {
  const who = teacherName ? lastWord(teacherName) : '';
  const cover = coverName && coverName !== teacherName ? `${who} → cover: ${lastWord(coverName)}` : who;
  const kind = lessonTypeCode === 'single' ? '' : lessonTypeLabel.toLowerCase();
  return [cover, kind, mode === 'online' ? 'online' : ''].filter((part) => part !== '').join(' · ');
};
