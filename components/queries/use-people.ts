'use client';

import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { getJson } from '@/lib/http/get-json';
import type { PickedPerson, PickedKind } from '@/lib/people/found';

/** People of one kind whose name holds what is typed. */
export const usePeople = (kind: PickedKind, text: string) =>
  useQuery({ queryKey: ['people', kind, text], enabled: text.trim().length > 1, placeholderData: keepPreviousData, queryFn: () => getJson<PickedPerson[]>('/api/people', { kind, text: text.trim() }) });
