'use client';

import { CircleCheck, CircleX } from 'lucide-react';
import { useEffect, useState, useTransition } from 'react';
import { useCardPayment } from '@/components/queries/use-card-payment';
import { Button, ButtonLink } from '@/components/ui/button';
import { Sheet } from '@/components/ui/sheet';
import { say } from '@/lib/explained';
import type { AttemptNow } from '@/lib/tuition/server/start-card-payment';
import { askProcessor } from '../../actions';

const PATIENCE_MS = 12_000;

/** Waits for the card processor's word; what the browser was sent back with is not believed. */
export function PaymentWatch({ attemptId, first, locale }: { attemptId: string; first: AttemptNow; locale: string }) {
  const { data, refetch, isError } = useCardPayment(attemptId, first);
  const [isLate, setIsLate] = useState(false);
  const [pending, startTransition] = useTransition();
  useEffect(() => {
    const timer = setTimeout(() => setIsLate(true), PATIENCE_MS);
    return () => clearTimeout(timer);
  }, []);
  const askNow = () => startTransition(async () => {
    await askProcessor({ attemptId }).catch(() => null);
    await refetch();
  });
  const amount = say(data.amountMinor, { currency: data.currency, locale });
  return (
    <Sheet className="flex flex-col items-start gap-3">
      <div role="status" aria-live="polite">
        {data.state === 'paid' ? <Outcome icon={<CircleCheck className="text-felt" aria-hidden />} title={`${amount} received`}>Thank you. The receipt is on its way by mail.</Outcome> : null}
        {data.state === 'failed' ? <Outcome icon={<CircleX className="text-brick" aria-hidden />} title="Not paid">{data.reason || 'The payment did not go through.'} Nothing was charged.</Outcome> : null}
        {data.state === 'waiting' ? <Outcome icon={<span aria-hidden className="mt-1 inline-block size-5 animate-spin rounded-full border-2 border-brass border-r-transparent" />} title="Waiting for the card processor">{amount} for invoice {data.documentNo}. This takes a few seconds; you can leave the page, nothing is lost.</Outcome> : null}
      </div>
      {isError ? <p role="alert" className="text-brick">The school cannot be reached just now; this page keeps asking.</p> : null}
      <div className="flex flex-wrap gap-3">
        {data.state === 'waiting' && isLate ? <Button pending={pending} onClick={askNow}>Ask the processor now</Button> : null}
        <ButtonLink href={`/bills/${data.invoiceId}`} kind={data.state === 'failed' ? 'brass' : 'plain'}>{data.state === 'failed' ? 'Try again' : 'See the invoice'}</ButtonLink>
        <ButtonLink href="/bills" kind="quiet">All bills</ButtonLink>
      </div>
    </Sheet>
  );
}

function Outcome({ icon, title, children }: { icon: React.ReactNode; title: string; children: React.ReactNode }) {
  return (
    <div className="flex gap-3">
      {icon}
      <div>
        <p className="font-display text-h2 font-semibold">{title}</p>
        <p className="mt-1 text-ink-2">{children}</p>
      </div>
    </div>
  );
}
