import { Chip } from '@/components/ui/chip';
import { ButtonLink } from '@/components/ui/button';
import { Sheet } from '@/components/ui/sheet';
import { say } from '@/lib/explained';
import { formatDate } from '@/lib/format';
import type { PayerBills } from '@/lib/tuition/server/payer-bills';
import { PayButton } from './pay-button';

/** What is to be paid next, with the one button that does it. */
export function NextDue({ bills, locale }: { bills: PayerBills; locale: string }) {
  const { nextDue, openMinor, overdueMinor, creditMinor, currency } = bills;
  const words = { currency, locale };
  const credit = creditMinor > 0 ? <p className="mt-2 text-small text-felt">The school holds {say(creditMinor, words)} of yours as credit.</p> : null;
  if (!nextDue) return <Sheet eyebrow="To pay"><p className="font-display text-h2 font-semibold">Nothing to pay</p>{credit}</Sheet>;
  return (
    <Sheet eyebrow={nextDue.nextDueOn ? `To pay by ${formatDate(nextDue.nextDueOn, locale, 'full')}` : 'To pay'} action={overdueMinor > 0 ? <Chip tone="bad">{say(overdueMinor, words)} overdue</Chip> : undefined}>
      <p className="num font-display text-[34px] font-semibold leading-tight">{say(nextDue.dueNowMinor, words)}</p>
      <p className="text-small text-ink-3">{nextDue.label}, invoice {nextDue.documentNo}</p>
      <div className="mt-3 flex flex-wrap items-start gap-2">
        <PayButton invoiceId={nextDue.invoiceId} what="due" label="Pay now" className="min-w-40 flex-1" />
        <ButtonLink href={`/bills/${nextDue.invoiceId}`} className="py-[13px]">See invoice</ButtonLink>
      </div>
      {openMinor > nextDue.dueNowMinor ? <p className="mt-3 text-small text-ink-3">Open altogether, with what is due later: {say(openMinor, words)}</p> : null}
      {credit}
    </Sheet>
  );
}
