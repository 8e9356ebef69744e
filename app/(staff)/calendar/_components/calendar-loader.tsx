'use client';

import dynamic from 'next/dynamic';
import { Skeleton } from '@/components/ui/states';

/** The calendar measures the page it stands on, so it is drawn in the browser only. */
export const CalendarLoader = dynamic(() => import('./calendar-screen').then(({ CalendarScreen }) => CalendarScreen), {
  ssr: false, loading: () => <div role="status"><span className="sr-only">Loading the calendar</span><Skeleton className="h-[620px] w-full" /></div>,
});
