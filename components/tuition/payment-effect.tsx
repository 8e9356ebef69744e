'use client';

import { useQuery } from '@tanstack/react-query';
import { useDeferredValue } from 'react';

export type PreviewPayment = (input: { payerId: string; amount: string }) => Promise<{ ok: true; data: { steps: string[] } } | { ok: false; message: string }>;

/** What is open, and what the typed amount would settle, while it is being typed. */
export function PaymentEffect({ payerId, amount, preview }: { payerId: string; amount: string; preview: PreviewPayment }) {
  const typed = useDeferredValue(amount);
  const { data } = useQuery({
    queryKey: ['desk-payment', payerId, typed], enabled: payerId !== '', placeholderData: (before) => before,
    queryFn: async () => {
      const result = await preview({ payerId, amount: typed });
      return result.ok ? result.data.steps : [];
    },
  });
  if (payerId === '' || !data || data.length === 0) return null;
  return (
    <div aria-live="polite" className="rounded bg-wash px-3 py-2 text-small text-ink-2">
      <p className="eyebrow mb-1">What it settles</p>
      <ul>{data.map((step, index) => <li key={index}>{step}</li>)}</ul>
    </div>
  );
}
