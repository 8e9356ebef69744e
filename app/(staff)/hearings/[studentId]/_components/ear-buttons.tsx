'use client';

import { Check, X } from 'lucide-react';
import { Button } from '@/components/ui/button';
import type { Hearing } from './use-hearing';

/** The teacher's word in place of the keys: for what is told, and for a piano that sends no notes. */
export function EarButtons({ hearing, label, isSmall = false }: { hearing: Hearing; label: string; isSmall?: boolean }) {
  const { takeByEar, isSending } = hearing;
  return (
    <div role="group" aria-label={label} className={isSmall ? 'grid w-full grid-cols-2 items-center gap-2 md:flex md:w-auto' : 'mt-4 grid grid-cols-2 gap-3'}>
      {isSmall ? <span className="col-span-2 text-small text-ink-3">{label}</span> : null}
      <Button pending={isSending} icon={<Check size={16} aria-hidden />} onClick={() => takeByEar('right')} className={isSmall ? 'max-md:min-h-[52px]' : 'min-h-[52px]'}>Right</Button>
      <Button disabled={isSending} icon={<X size={16} aria-hidden />} onClick={() => takeByEar('not_right')} className={isSmall ? 'max-md:min-h-[52px]' : 'min-h-[52px]'}>Not right</Button>
    </div>
  );
}
