'use client';

import FullCalendar from '@fullcalendar/react';
import dayGridPlugin from '@fullcalendar/react/daygrid';
import interactionPlugin from '@fullcalendar/react/interaction';
import listPlugin from '@fullcalendar/react/list';
import timeGridPlugin from '@fullcalendar/react/timegrid';
import classicThemePlugin from '@fullcalendar/react/themes/classic';
import '@fullcalendar/react/skeleton.css';
import '@fullcalendar/react/themes/classic/theme.css';
import '@fullcalendar/react/themes/classic/palette.css';
import './calendar.css';
import { useRouter } from 'next/navigation';
import { useMemo, useState } from 'react';
import { useCalendar } from '@/components/queries/use-calendar';
import { SelectField } from '@/components/ui/inputs';
import { ErrorState } from '@/components/ui/states';
import type { CalendarChoices, CalendarEntry } from '@/lib/calendar/server/calendar-week';
import { addDays, clockOf, instantOf, localDateOf, minuteOfDayOf, type LocalDate } from '@/lib/time';

type CalendarScreenProps = { choices: CalendarChoices; first: { teacherId: string | null; roomId: string | null }; date: LocalDate; today: LocalDate; zone: string; locale: string; weekStart: number };

const PLUGINS = [classicThemePlugin, timeGridPlugin, dayGridPlugin, listPlugin, interactionPlugin];
const CLASSES: Record<string, string> = { petrol: 'rw-petrol', plum: 'rw-plum', felt: 'rw-felt', brass: 'rw-brass', wash: 'rw-wash' };

/** Wall-clock times travel as if they were UTC: the calendar shows the school's clock whatever the reader's own zone is. */
const wallTime = (date: LocalDate, minute: number) => `${minute >= 1440 ? addDays(date, Math.floor(minute / 1440)) : date}T${clockOf(minute % 1440)}:00Z`;

const toEvent = (entry: CalendarEntry) => ({
  id: entry.id, title: entry.title, start: wallTime(entry.localDate, entry.startMin), end: wallTime(entry.localDate, entry.startMin + entry.lengthMinutes),
  allDay: entry.lengthMinutes === 1440, extendedProps: { entry },
});

export function CalendarScreen({ choices, first, date, today, zone, locale, weekStart }: CalendarScreenProps) {
  const router = useRouter();
  const [who, setWho] = useState(first);
  const [span, setSpan] = useState<{ from: number; until: number } | null>(null);
  const { data, isError, refetch } = useCalendar(span ? { ...span, teacherId: who.teacherId ?? undefined, roomId: who.roomId ?? undefined } : null);
  const events = useMemo(() => (data ?? []).map(toEvent), [data]);
  const hours = useMemo(() => shownHours(data ?? []), [data]);
  const isNarrow = window.matchMedia('(max-width: 760px)').matches;
  const schoolNow = () => { const at = Math.floor(Date.now() / 1000); return wallTime(localDateOf(at, zone), minuteOfDayOf(at, zone)); };
  return (
    <div className="rw-calendar">
      {choices.teachers.length > 0 ? (
        <div className="mb-3 grid gap-3 sm:max-w-[560px] sm:grid-cols-2">
          <SelectField label="Teacher" placeholder="All teachers" options={choices.teachers} value={who.teacherId ?? ''} onChange={(event) => setWho({ teacherId: event.target.value || null, roomId: null })} />
          <SelectField label="Room" placeholder="All rooms" options={choices.rooms} value={who.roomId ?? ''} onChange={(event) => setWho({ teacherId: null, roomId: event.target.value || null })} />
        </div>
      ) : null}
      {isError ? <ErrorState message="The calendar could not be read just now." onRetry={() => void refetch()} /> : null}
      <FullCalendar
        plugins={PLUGINS} timeZone="UTC" now={schoolNow} locale={locale} firstDay={weekStart % 7} initialDate={date} initialView={isNarrow ? 'listWeek' : 'timeGridWeek'}
        headerToolbar={{ start: 'prev,today,next', center: 'title', end: isNarrow ? 'listWeek,timeGridDay' : 'timeGridWeek,dayGridMonth,listWeek' }}
        buttons={{ today: { text: 'Today' }, timeGridWeek: { text: 'Week' }, dayGridMonth: { text: 'Month' }, listWeek: { text: 'List' }, timeGridDay: { text: 'Day' } }}
        slotMinTime={hours.from} slotMaxTime={hours.to} slotDuration="00:15:00" slotHeaderInterval="01:00" nowIndicator allDayText="all day" height="auto" tableHeaderSticky={false}
        eventTimeFormat={{ hour: '2-digit', minute: '2-digit', hour12: false }} slotHeaderFormat={{ hour: '2-digit', minute: '2-digit', hour12: false }}
        noEventsText="Nothing in this week." events={events} allDaySlot={events.some(({ allDay }) => allDay)}
        eventClass={({ event }) => CLASSES[(event.extendedProps.entry as CalendarEntry).colour] ?? 'rw-petrol'}
        datesSet={({ startStr, endStr }) => setSpan({ from: instantOf(startStr.slice(0, 10), 0, zone), until: instantOf(endStr.slice(0, 10), 0, zone) })}
        eventClick={({ event }) => { const entry = event.extendedProps.entry as CalendarEntry; if (entry.kind === 'lesson' || entry.kind === 'event') router.push(`/today?date=${entry.localDate}`); }}
        eventContent={({ event }) => <EntryWords entry={event.extendedProps.entry as CalendarEntry} />}
      />
      <p className="sr-only" aria-live="polite">{data ? `${data.length} entries` : 'Loading'} {today}</p>
    </div>
  );
}

/** The hours in which something happens, at least a teaching afternoon. */
function shownHours(entries: readonly CalendarEntry[]): { from: string; to: string } {
  const timed = entries.filter(({ lengthMinutes }) => lengthMinutes < 1440);
  const from = Math.min(13 * 60, ...timed.map(({ startMin }) => startMin));
  const to = Math.max(19 * 60, ...timed.map(({ startMin, lengthMinutes }) => startMin + lengthMinutes));
  return { from: `${clockOf(Math.floor(from / 60) * 60)}:00`, to: `${String(Math.min(24, Math.ceil(to / 60))).padStart(2, '0')}:00:00` };
}

function EntryWords({ entry }: { entry: CalendarEntry }) {
  return (
    <span className="block min-w-0 overflow-hidden leading-[1.25]">
      <span className="block truncate font-semibold">{entry.lengthMinutes === 1440 ? '' : `${clockOf(entry.startMin)} `}{entry.title}</span>
      <span className="block truncate text-[12px]">{[entry.detail, entry.roomName].filter((part) => part !== '').join(', ')}</span>
    </span>
  );
}
