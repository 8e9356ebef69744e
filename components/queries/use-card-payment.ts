'use client';

import { useQuery } from '@tanstack/react-query';
import { getJson } from '@/lib/http/get-json';
import type { AttemptNow } from '@/lib/tuition/server/start-card-payment';

const ASK_AGAIN_MS = 1000;

/** Follows a card payment until the processor's event has settled it. */
export const useCardPayment = (attemptId: string, initialData: AttemptNow) =>
  useQuery({
    queryKey: ['card-payment', attemptId], initialData, queryFn: () => getJson<AttemptNow>(`/api/bills/attempts/${attemptId}`),
    refetchInterval: ({ state }) => (state.data?.state === 'waiting' ? ASK_AGAIN_MS : false),
  });
