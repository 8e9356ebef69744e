import { say, type MoneyWords } from '@/lib/explained';
import { formatDate } from '@/lib/format';
import type { PayerInvoice } from '@/lib/tuition/server/payer-bills';
import { PayButton } from './pay-button';

/** The payer's own part of the invoice, when it is due, and the way to pay it. */
export function OwnShare({ invoice, words }: { invoice: PayerInvoice; words: MoneyWords }) {
  const { dueNowMinor } = invoice;
  return (
    <div className="pt-5">
      <ul className="flex flex-col gap-1 text-ink-2">{invoice.parts.map(({ sentence }) => <li key={sentence}>{sentence}</li>)}</ul>
      <p className="mt-3 flex items-baseline justify-between gap-4 border-t-2 border-ink pt-3">
        <span className="font-semibold">You pay</span>
        <span className="num font-display text-[28px] font-semibold">{say(invoice.amountMinor, words)}</span>
      </p>
      <Instalments invoice={invoice} words={words} />
      {dueNowMinor > 0 ? (
        <div className="no-print mt-5 flex flex-wrap gap-3">
          <PayButton invoiceId={invoice.invoiceId} what="due" label={`Pay ${say(dueNowMinor, words)} now`} className="min-w-52 flex-1" />
          {invoice.openMinor > dueNowMinor ? <PayButton invoiceId={invoice.invoiceId} what="all" kind="plain" label={`Pay all ${say(invoice.openMinor, words)}`} className="min-w-40" /> : null}
        </div>
      ) : null}
    </div>
  );
}

function Instalments({ invoice, words }: { invoice: PayerInvoice; words: MoneyWords }) {
  return (
    <ul className="mt-3 flex flex-col gap-1 text-small">
      {invoice.instalments.filter(({ amountMinor }) => amountMinor > 0).map(({ instalmentNo, dueOn, amountMinor, openMinor }) => (
        <li key={instalmentNo} className="flex justify-between gap-4">
          <span className="text-ink-2">{invoice.instalments.length > 1 ? `Instalment ${instalmentNo}, due` : 'Due'} {formatDate(dueOn, words.locale, 'full')}</span>
          <span className="num">{openMinor === 0 ? `${say(amountMinor, words)}, paid` : openMinor < amountMinor ? `${say(openMinor, words)} of ${say(amountMinor, words)} open` : say(amountMinor, words)}</span>
        </li>
      ))}
    </ul>
  );
}
