import { ButtonLink } from '@/components/ui/button';
import { Chip } from '@/components/ui/chip';
import { Sheet } from '@/components/ui/sheet';
import { formatDate, formatMoney } from '@/lib/format';
import type { LocalDate } from '@/lib/time';
import type { PayerBills } from '@/lib/tuition/server/payer-bills';

/** What is owed and by when; one press leads to paying it. */
export function ToPay({ bills: { nextDue, currency, openMinor, overdueMinor }, locale, today }: { bills: PayerBills; locale: string; today: LocalDate }) {
  if (!nextDue) {
    return <Sheet eyebrow="To pay"><p>Nothing is open. Thank you.</p></Sheet>;
  }
  const isOverdue = nextDue.nextDueOn !== null && nextDue.nextDueOn < today;
  const dueMinor = isOverdue ? overdueMinor : nextDue.dueNowMinor;
  return (
    <Sheet eyebrow={nextDue.nextDueOn ? `To pay by ${formatDate(nextDue.nextDueOn, locale, 'plain')}` : 'To pay'} action={isOverdue ? <Chip tone="bad">overdue</Chip> : <Chip tone="wait">open</Chip>}>
      <p className="num font-display text-figure font-semibold">{formatMoney({ amountMinor: dueMinor, currency }, locale)}</p>
      <p className="text-small text-ink-3">{nextDue.label}{openMinor > dueMinor ? `. ${formatMoney({ amountMinor: openMinor, currency }, locale)} in all.` : ''}</p>
      <div className="mt-3 flex gap-2">
        <ButtonLink kind="brass" className="flex-1" href={`/bills/${nextDue.invoiceId}`}>Pay</ButtonLink>
        <ButtonLink href="/bills">See all</ButtonLink>
      </div>
    </Sheet>
  );
}
