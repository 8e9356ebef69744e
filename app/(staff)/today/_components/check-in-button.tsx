'use client';

import { useTransition } from 'react';
import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import type { BoardSeat } from '@/lib/calendar/server/day-board';
import { setCheckIn } from '../actions';

export function CheckInButton({ seat, onChange }: { seat: Pick<BoardSeat, 'id' | 'studentName' | 'hasArrived'>; onChange: () => void }) {
  const [pending, startTransition] = useTransition();
  const toggle = () => startTransition(async () => {
    const result = await setCheckIn({ seatId: seat.id, hasArrived: !seat.hasArrived }).catch(() => null);
    if (!result?.ok) toast.error(result?.message ?? 'This did not reach the school. Press again.');
    onChange();
  });
  return <Button kind={seat.hasArrived ? 'plain' : 'primary'} pending={pending} onClick={toggle}>{seat.hasArrived ? 'Not in after all' : 'Check in'}</Button>;
}
