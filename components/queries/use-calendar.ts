'use client';

import { keepPreviousData, useQuery } from '@tanstack/react-query';
import type { CalendarEntry } from '@/lib/calendar/server/calendar-week';
import { getJson } from '@/lib/http/get-json';

export type CalendarWish = { from: number; until: number; teacherId?: string; roomId?: string };

export const useCalendar = (wish: CalendarWish | null) =>
  useQuery({ queryKey: ['calendar', wish], queryFn: () => getJson<CalendarEntry[]>('/api/calendar', wish ?? {}), enabled: wish !== null, placeholderData: keepPreviousData });
