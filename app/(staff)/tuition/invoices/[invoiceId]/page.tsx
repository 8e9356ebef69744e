import Link from 'next/link';
import { InvoicePaper } from '@/components/tuition/invoice-paper';
import { ShareChip } from '@/components/tuition/share-chip';
import { ButtonLink } from '@/components/ui/button';
import { PageHeader } from '@/components/ui/page-header';
import { PrintButton } from '@/components/ui/print-button';
import { say } from '@/lib/explained';
import { formatDate } from '@/lib/format';
import { requireContextTo } from '@/lib/server/context';
import { orNotFound } from '@/lib/server/or-not-found';
import { staffInvoice } from '@/lib/tuition/server/staff-invoice';

export const metadata = { title: 'Invoice' };

export default async function InvoicePage({ params }: { params: Promise<{ invoiceId: string }> }) {
  const context = await requireContextTo('read', 'Invoice');
  const invoice = await orNotFound(staffInvoice(await params, context));
  const words = { currency: invoice.currency, locale: context.school.locale };
  return (
    <div className="max-w-[860px]">
      <div className="no-print">
        <PageHeader title={`Invoice ${invoice.documentNo}`} sub={<Link href={`/families/${invoice.familyId}`} className="font-semibold text-petrol">{invoice.familyName} family</Link>} actions={<><ButtonLink href="/tuition/invoices" kind="quiet">All invoices</ButtonLink><PrintButton /></>} />
      </div>
      <InvoicePaper schoolName={context.school.name} seller={invoice.seller} head={invoice} to={{ name: `${invoice.familyName} family`, address: '' }} lines={invoice.lines} words={words}>
        <dl className="num ml-auto grid w-fit grid-cols-[auto_auto] gap-x-6 gap-y-1 pt-4 text-right">
          {invoice.tax.filter(({ treatment }) => treatment === 'taxed').map(({ rateBp, netMinor, taxMinor }) => <div key={rateBp} className="contents"><dt className="text-ink-3">{rateBp / 100} % tax on {say(netMinor, words)}</dt><dd>{say(taxMinor, words)}</dd></div>)}
          <dt className="font-semibold">Total</dt><dd className="font-display text-h2 font-semibold">{say(invoice.totalMinor, words)}</dd>
        </dl>
        <section className="mt-6" aria-label="Shares of the payers">
          <p className="eyebrow mb-2">Who pays</p>
          <ul className="flex flex-col gap-3">
            {invoice.shares.map((share) => (
              <li key={share.payerName} className="flex flex-wrap items-baseline justify-between gap-x-4 border-t border-rule pt-2">
                <span className="min-w-0"><b>{share.payerName}</b> <ShareChip state={share.state} /><span className="block text-small text-ink-2">{share.parts.join(', ')}{share.nextDueOn ? `. Next due ${formatDate(share.nextDueOn, words.locale, 'short')}` : ''}</span></span>
                <span className="num"><b>{say(share.amountMinor, words)}</b>{share.openMinor > 0 && share.openMinor < share.amountMinor ? <span className="block text-small text-ink-3">{say(share.openMinor, words)} open</span> : null}</span>
              </li>
            ))}
          </ul>
        </section>
      </InvoicePaper>
    </div>
  );
}
