import Link from 'next/link';
import { say } from '@/lib/explained';
import { formatDate } from '@/lib/format';
import { AGE_BUCKETS, AGE_WORDS } from '@/lib/tuition/ageing';
import { METHOD_WORDS } from '@/lib/tuition/schema';
import type { FamilyBalance as Balance, PayerBalance } from '@/lib/tuition/server/staff-invoice';
import { Sheet } from '../ui/sheet';
import { ShareChip } from './share-chip';

type FamilyBalanceProps = { balance: Balance; locale: string; action?: React.ReactNode };
const SHOWN = 5;

/** What a family owes, payer by payer and by age, with its last invoices and payments: for the desk on the telephone. */
export function FamilyBalance({ balance, locale, action }: FamilyBalanceProps) {
  const words = { currency: balance.currency, locale };
  return (
    <Sheet eyebrow="Money" action={action}>
      <p className="num font-display text-[26px] font-semibold">{balance.openMinor === 0 ? 'Nothing open' : `${say(balance.openMinor, words)} open`}</p>
      <ul className="mt-2 flex flex-col gap-2">{balance.payers.map((payer) => <PayerLine key={payer.payerId} payer={payer} words={words} />)}</ul>
      <div className="mt-4 grid gap-5 md:grid-cols-2">
        <section>
          <p className="eyebrow mb-1">Invoices</p>
          {balance.invoices.length === 0 ? <p className="text-small text-ink-3">None yet.</p> : null}
          <ul>{balance.invoices.slice(0, SHOWN).map((invoice) => (
            <li key={invoice.invoiceId} className="flex items-center justify-between gap-3 border-t border-rule py-2">
              <Link href={`/tuition/invoices/${invoice.invoiceId}`} className="num font-semibold text-petrol">{invoice.documentNo}</Link>
              <ShareChip state={invoice.state} />
              <span className="num">{say(invoice.totalMinor, words)}</span>
            </li>
          ))}</ul>
        </section>
        <section>
          <p className="eyebrow mb-1">Payments</p>
          {balance.payments.length === 0 ? <p className="text-small text-ink-3">None yet.</p> : null}
          <ul>{balance.payments.slice(0, SHOWN).map((payment) => (
            <li key={payment.id} className="flex justify-between gap-3 border-t border-rule py-2">
              <span>{formatDate(payment.receivedOn, locale)}, {METHOD_WORDS[payment.method]}<span className="block text-small text-ink-3">{payment.payerName}</span></span>
              <span className="num">{say(payment.amountMinor, words)}</span>
            </li>
          ))}</ul>
        </section>
      </div>
    </Sheet>
  );
}

function PayerLine({ payer, words }: { payer: PayerBalance; words: { currency: string; locale: string } }) {
  const aged = AGE_BUCKETS.filter((bucket) => payer.ageing.buckets[bucket] > 0).map((bucket) => `${AGE_WORDS[bucket].toLowerCase()} ${say(payer.ageing.buckets[bucket], words)}`);
  return (
    <li className="flex flex-wrap justify-between gap-x-4">
      <span><b>{payer.name}</b>{aged.length > 0 ? <span className="block text-small text-ink-3">{aged.join(', ')}</span> : null}</span>
      <span className="num text-right">{payer.openMinor > 0 ? say(payer.openMinor, words) : 'settled'}{payer.creditMinor > 0 ? <span className="block text-small text-felt">{say(payer.creditMinor, words)} credit</span> : null}</span>
    </li>
  );
}
