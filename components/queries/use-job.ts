'use client';

import { useQuery } from '@tanstack/react-query';
import { getJson } from '@/lib/http/get-json';

export type JobProgress = { state: 'queued' | 'running' | 'done' | 'failed'; label: string; doneCount: number; totalCount: number | null; message: string; result: unknown };

/** Follows a piece of slow work until it ends. */
export const useJob = (id: string | null) =>
  useQuery({
    queryKey: ['job', id], enabled: id !== null, queryFn: () => getJson<JobProgress>(`/api/jobs/${id}`),
    refetchInterval: ({ state }) => (state.data?.state === 'done' || state.data?.state === 'failed' ? false : 500),
  });
