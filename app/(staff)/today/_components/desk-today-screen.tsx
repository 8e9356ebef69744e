'use client';

import { ChevronLeft, ChevronRight } from 'lucide-react';
import Link from 'next/link';
import { useState } from 'react';
import { useDeskToday } from '@/components/queries/use-desk-today';
import { RoomBoard } from '@/components/room-board/room-board';
import { Find } from '@/components/shell/find';
import { ButtonLink, buttonClass } from '@/components/ui/button';
import { PageHeader } from '@/components/ui/page-header';
import { EmptyState } from '@/components/ui/states';
import { useNow } from '@/components/ui/use-now';
import type { DeskToday } from '@/lib/calendar/server/desk-today';
import { plural } from '@/lib/format';
import { addDays, minuteOfDayOf, type LocalDate } from '@/lib/time';
import { LessonDrawer } from './lesson-drawer';
import { NeedsPersonList } from './needs-person-list';
import { QuickOpenings } from './quick-openings';

export type Heading = { title: string; date: LocalDate; isToday: boolean; zone: string };

export function DeskTodayScreen({ first, heading }: { first: DeskToday; heading: Heading }) {
  const { data } = useDeskToday(heading.date, first);
  const [siteId, setSiteId] = useState<string | null>(first.board.rooms[0]?.siteId ?? null);
  const [openId, setOpenId] = useState<string | null>(null);
  const at = useNow();
  const sites = [...new Map(data.board.rooms.map((room) => [room.siteId, room.siteName])).entries()];
  const opened = data.board.lessons.find(({ id }) => id === openId) ?? null;
  return (
    <>
      <PageHeader title={heading.title} sub={summaryWords(data)} actions={<><Find /><ButtonLink href="/calendar">Week</ButtonLink><ButtonLink kind="primary" href="/book">Book</ButtonLink></>} />
      <div className="mb-3 flex flex-wrap items-center gap-2">
        <DayStep date={addDays(heading.date, -1)} label="The day before"><ChevronLeft size={16} aria-hidden /></DayStep>
        {heading.isToday ? null : <Link href="/today" className={buttonClass('plain')}>Today</Link>}
        <DayStep date={addDays(heading.date, 1)} label="The day after"><ChevronRight size={16} aria-hidden /></DayStep>
        {sites.length > 1 ? sites.map(([id, name]) => (
          <button key={id} type="button" aria-pressed={siteId === id} onClick={() => setSiteId(id)} className={buttonClass(siteId === id ? 'primary' : 'plain')}>{name}</button>
        )) : null}
      </div>
      <div className="grid items-start gap-[18px] xl:grid-cols-[minmax(0,1fr)_264px]">
        {data.board.closure ? <p className="rounded border border-brass bg-brass-wash px-4 py-3 font-semibold text-brass xl:col-span-2">No teaching: {data.board.closure}</p> : null}
        {data.board.rooms.length === 0 ? <div className="sheet"><EmptyState title="No rooms yet" action={<ButtonLink href="/rooms" kind="primary">Add the rooms</ButtonLink>}>The board shows the day by rooms. Add them once, or bring everything in with the importer.</EmptyState></div>
          : <RoomBoard board={data.board} siteId={siteId} now={heading.isToday && at !== null ? { at, minute: minuteOfDayOf(at, heading.zone) } : null} onOpen={({ id }) => setOpenId(id)} />}
        <aside className="flex flex-col gap-[14px]">
          <NeedsPersonList needs={data.needs} isToday={heading.isToday} />
          <QuickOpenings />
        </aside>
      </div>
      {opened ? <LessonDrawer lesson={opened} date={heading.date} onClose={() => setOpenId(null)} /> : null}
    </>
  );
}

function DayStep({ date, label, children }: { date: LocalDate; label: string; children: React.ReactNode }) {
  return <Link href={`/today?date=${date}`} aria-label={label} className={buttonClass('plain', '!px-3')}>{children}</Link>;
}

function summaryWords({ summary: { lessons, trials, rehearsals, usedPercent } }: DeskToday): string {
  const parts = [plural(lessons, 'lesson'), ...(trials > 0 ? [plural(trials, 'trial')] : []), ...(rehearsals > 0 ? [plural(rehearsals, 'rehearsal')] : [])];
  return `${parts.join(', ')}.${usedPercent === null ? '' : ` Rooms ${usedPercent}% used after 15:00.`}`;
}
