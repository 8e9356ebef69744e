'use client';

import { useQuery } from '@tanstack/react-query';
import type { DeskToday } from '@/lib/calendar/server/desk-today';
import { getJson } from '@/lib/http/get-json';

/** The board asks again every second and a half, so that two desks see each other's check-ins. */
const REFRESH_MS = 1500;

export const deskTodayKey = (date: string) => ['desk-today', date] as const;

export const useDeskToday = (date: string, initialData: DeskToday) =>
  useQuery({ queryKey: deskTodayKey(date), queryFn: () => getJson<DeskToday>('/api/desk-today', { date }), initialData, refetchInterval: REFRESH_MS });
