'use client';

import { useState, useTransition } from 'react';
import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import { startPayment } from '../actions';

type PayButtonProps = { invoiceId: string; what: 'due' | 'all'; label: string; kind?: 'brass' | 'plain'; className?: string };

/** Opens the card processor's page. Pressed twice it opens the same page. */
export function PayButton({ invoiceId, what, label, kind = 'brass', className = '' }: PayButtonProps) {
  const [error, setError] = useState<string>();
  const [pending, startTransition] = useTransition();
  const pay = () => startTransition(async () => {
    const result = await startPayment({ invoiceId, what }).catch(() => null);
    if (result?.ok) window.location.assign(result.data.url);
    else setError(result?.message ?? 'The payment page could not be opened just now. Nothing was charged; try again.');
  });
  return (
    <div className={className}>
      <Button kind={kind} pending={pending} onClick={pay} className="w-full py-[13px]">{label}</Button>
      {error ? <div className="mt-2"><FormError message={error} /></div> : null}
    </div>
  );
}
