'use client';

import { useRef } from 'react';
import type { BoardLesson, DayBoard } from '@/lib/calendar/server/day-board';
import { clockOf } from '@/lib/time';
import { BoardBlock } from './board-block';
import { boardHours, HOUR_PX, offsetOf, roomsOfSite } from './geometry';

type RoomBoardProps = { board: DayBoard; siteId: string | null; now: { minute: number; at: number } | null; onOpen: (lesson: BoardLesson) => void };

/** The day by rooms: rooms across, time down, the line of now. Arrows move between bookings, Enter opens one. */
export function RoomBoard({ board, siteId, now, onOpen }: RoomBoardProps) {
  const { fromMin, toMin, hours } = boardHours(board.lessons, board.openFromMin, board.openToMin);
  const rooms = roomsOfSite(board.rooms, siteId);
  const grid = useRef<HTMLDivElement>(null);
  const columns = { gridTemplateColumns: `54px repeat(${rooms.length}, minmax(var(--room-width), 1fr))` };
  return (
    <div className="sheet overflow-x-auto" tabIndex={-1}>
      <div className="min-w-fit [--room-width:150px] md:[--room-width:122px]" role="group" aria-label="Room board">
        <div className="sticky top-0 z-20 grid border-b border-rule-strong bg-sheet" style={columns}>
          <span />
          {rooms.map(({ id, name, description }) => (
            <div key={id} className="border-l border-rule px-[10px] py-2">
              <h2 className="text-[17px]">{name}</h2>
              <p className="text-small text-ink-3">{description || '\u00a0'}</p>
            </div>
          ))}
        </div>
        <div ref={grid} role="presentation" onKeyDown={(event) => moveBetween(event, grid.current)} className="relative grid" style={{ ...columns, height: ((toMin - fromMin) * HOUR_PX) / 60 }}>
          <div className="relative">
            {hours.map((hour) => <span key={hour} className="num absolute right-2 -translate-y-1/2 bg-sheet px-1 text-small text-ink-3 first:translate-y-0" style={{ top: offsetOf(hour * 60, fromMin) }}>{clockOf(hour * 60)}</span>)}
          </div>
          {rooms.map((room, index) => (
            <div key={room.id} data-column={index} className="relative border-l border-rule">
              {hours.map((hour) => <span key={hour} aria-hidden className="absolute inset-x-0 border-t border-rule" style={{ top: offsetOf(hour * 60, fromMin) }} />)}
              {board.lessons.filter(({ roomId }) => roomId === room.id).map((lesson) => <BoardBlock key={lesson.id} lesson={lesson} fromMin={fromMin} now={now?.at ?? null} onOpen={onOpen} />)}
            </div>
          ))}
          {now && now.minute >= fromMin && now.minute < toMin ? <NowLine minute={now.minute} fromMin={fromMin} /> : null}
        </div>
      </div>
    </div>
  );
}

function NowLine({ minute, fromMin }: { minute: number; fromMin: number }) {
  return (
    <div className="pointer-events-none absolute inset-x-0 z-10 flex items-center" style={{ top: offsetOf(minute, fromMin) }}>
      <span className="num -translate-y-1/2 rounded bg-brick px-2 py-[2px] text-[11.5px] font-bold text-white">{clockOf(minute)}</span>
      <span className="h-[2px] flex-1 -translate-y-1/2 bg-brick" />
    </div>
  );
}

/** Up and down within a room, left and right to the nearest booking of the next room. */
function moveBetween(event: React.KeyboardEvent, grid: HTMLElement | null): void {
  const current = document.activeElement?.closest<HTMLElement>('[data-block]');
  if (!grid || !current || !['ArrowUp', 'ArrowDown', 'ArrowLeft', 'ArrowRight'].includes(event.key)) return;
  event.preventDefault();
  const column = Number(current.closest<HTMLElement>('[data-column]')?.dataset.column);
  const blocksOf = (index: number) => [...grid.querySelectorAll<HTMLElement>(`[data-column="${index}"] [data-block]`)].sort((a, b) => a.offsetTop - b.offsetTop);
  if (event.key === 'ArrowUp' || event.key === 'ArrowDown') {
    const own = blocksOf(column);
    own[own.indexOf(current) + (event.key === 'ArrowDown' ? 1 : -1)]?.focus();
    return;
  }
  const step = event.key === 'ArrowRight' ? 1 : -1;
  const count = grid.querySelectorAll('[data-column]').length;
  for (let index = column + step; index >= 0 && index < count; index += step) {
    const nearest = blocksOf(index).sort((a, b) => Math.abs(a.offsetTop - current.offsetTop) - Math.abs(b.offsetTop - current.offsetTop))[0];
    if (nearest) return nearest.focus();
  }
}
