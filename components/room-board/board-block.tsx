'use client';

import type { BoardLesson } from '@/lib/calendar/server/day-board';
import { ATTENDANCE_WORDS } from '@/lib/calendar/attendance';
import { clockOf } from '@/lib/time';
import { Chip, type ChipTone } from '../ui/chip';
import { blockDetail, blockStyle, blockTitle } from './geometry';

const COLOURS: Record<string, string> = {
  petrol: 'bg-petrol-wash border-l-petrol', plum: 'bg-plum-wash border-l-plum', felt: 'bg-felt-wash border-l-felt', brass: 'bg-brass-wash border-l-brass',
};
const EVENT = 'bg-plum-wash border-l-plum';
/** A lesson becomes late to the eye ten minutes after its start. */
const LATE_SECONDS = 600;

export function BoardBlock({ lesson, fromMin, now, onOpen }: { lesson: BoardLesson; fromMin: number; now: number | null; onOpen: (lesson: BoardLesson) => void }) {
  const state = stateOf(lesson, now);
  const title = blockTitle(lesson);
  const colour = lesson.plannedTeacherId ? (COLOURS[lesson.teacherColour ?? 'petrol'] ?? COLOURS.petrol) : EVENT;
  const isShort = lesson.lengthMinutes <= 20;
  return (
    <button
      type="button" data-block={lesson.id} onClick={() => onOpen(lesson)} style={blockStyle(lesson, fromMin)}
      aria-label={`${clockOf(lesson.startMin)}, ${title}, ${blockDetail(lesson)}, ${lesson.roomName ?? ''}${state ? `, ${state.word}` : ''}`}
      className={`absolute inset-x-1 flex flex-col items-stretch justify-start overflow-hidden rounded-[3px] border-l-4 px-2 py-[3px] text-left leading-[1.3] hover:brightness-[.98] focus-visible:z-10 ${colour}`}
    >
      <span className="flex items-start justify-between gap-1">
        <span className="min-w-0 truncate text-[13.5px] font-semibold">{title}</span>
        {state ? <Chip tone={state.tone} className="!px-[7px] !py-0 !text-[12px]">{state.word}</Chip> : null}
      </span>
      {isShort ? null : <span className="block truncate text-small text-ink-2">{blockDetail(lesson)}</span>}
    </button>
  );
}

function stateOf(lesson: BoardLesson, now: number | null): { word: string; tone: ChipTone } | null {
  const [seat] = lesson.seats;
  if (lesson.state === 'needs_cover') return { word: 'no teacher', tone: 'bad' };
  if (!seat) return null;
  if (lesson.seats.length > 1) return groupState(lesson);
  if (seat.attendance !== 'expected') return { word: shortWord(seat.attendance), tone: seat.attendance === 'present' || seat.attendance === 'online' ? 'ok' : seat.attendance === 'late' ? 'wait' : 'neutral' };
  if (seat.hasArrived) return { word: 'here', tone: 'ok' };
  if (now === null || now < lesson.startsAt) return lesson.lessonTypeCode === 'trial' ? { word: 'greet', tone: 'wait' } : null;
  if (now >= lesson.endsAt) return { word: 'not marked', tone: 'wait' };
  return now >= lesson.startsAt + LATE_SECONDS ? { word: 'late', tone: 'bad' } : null;
}

function groupState({ seats }: BoardLesson): { word: string; tone: ChipTone } {
  const here = seats.filter(({ attendance, hasArrived }) => hasArrived || attendance === 'present' || attendance === 'late').length;
  return { word: `${here} of ${seats.length}`, tone: here === seats.length ? 'ok' : 'neutral' };
}

const shortWord = (attendance: BoardLesson['seats'][number]['attendance']): string =>
  ({ late: 'came late', away_with_notice: 'away', late_notice: 'away, late', no_show: 'did not come' } as Partial<Record<string, string>>)[attendance] ?? ATTENDANCE_WORDS[attendance];
