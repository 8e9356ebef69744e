import Link from 'next/link';
import { ShareChip } from '@/components/tuition/share-chip';
import { Sheet } from '@/components/ui/sheet';
import { EmptyState } from '@/components/ui/states';
import { say } from '@/lib/explained';
import { formatDate } from '@/lib/format';
import type { BillRow, OwnPayment } from '@/lib/tuition/server/payer-bills';
import { METHOD_WORDS } from '@/lib/tuition/schema';

export function BillList({ bills, locale }: { bills: readonly BillRow[]; locale: string }) {
  if (bills.length === 0) return <Sheet><EmptyState title="No bills yet">The school sends one when the term’s tuition is worked out. You will get a mail.</EmptyState></Sheet>;
  return (
    <Sheet eyebrow="All bills" flush>
      <ul>
        {bills.map((bill) => (
          <li key={bill.invoiceId} className="border-t border-rule">
            <Link href={`/bills/${bill.invoiceId}`} className="flex items-center gap-3 px-4 py-3 hover:bg-wash/60 tap">
              <span className="min-w-0 flex-1">
                <span className="block font-semibold">{bill.label}</span>
                <span className="num block text-small text-ink-3">{bill.documentNo}, {formatDate(bill.issuedOn, locale, 'full')}</span>
              </span>
              <ShareChip state={bill.state} />
              <span className="num w-24 text-right font-semibold">{say(bill.amountMinor, { currency: bill.currency, locale })}</span>
            </Link>
          </li>
        ))}
      </ul>
    </Sheet>
  );
}

export function PaymentHistory({ payments, locale }: { payments: readonly OwnPayment[]; locale: string }) {
  if (payments.length === 0) return null;
  return (
    <Sheet eyebrow="What you have paid" flush>
      <ul>
        {payments.map((payment) => (
          <li key={payment.id} className="border-t border-rule">
            <details className="px-4 py-3">
              <summary className="flex cursor-pointer list-none items-center gap-3 tap [&::-webkit-details-marker]:hidden">
                <span className="min-w-0 flex-1">
                  <span className="block">{formatDate(payment.receivedOn, locale, 'full')}</span>
                  <span className="num block text-small text-ink-3">Receipt {payment.receiptNo}, {METHOD_WORDS[payment.method as keyof typeof METHOD_WORDS]}{payment.cardLast4 ? ` ending ${payment.cardLast4}` : ''}</span>
                </span>
                <span className="num font-semibold underline decoration-rule-strong decoration-dotted underline-offset-4">{say(payment.amountMinor, { currency: payment.currency, locale })}</span>
              </summary>
              <ol className="mt-2 rounded bg-wash px-3 py-2 text-small text-ink-2">{payment.steps.map((step, index) => <li key={index}>{step}</li>)}</ol>
            </details>
          </li>
        ))}
      </ul>
    </Sheet>
  );
}
