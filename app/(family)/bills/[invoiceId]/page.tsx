import { InvoicePaper } from '@/components/tuition/invoice-paper';
import { ShareChip } from '@/components/tuition/share-chip';
import { ButtonLink } from '@/components/ui/button';
import { PageHeader } from '@/components/ui/page-header';
import { PrintButton } from '@/components/ui/print-button';
import { requireContextTo } from '@/lib/server/context';
import { orNotFound } from '@/lib/server/or-not-found';
import { payerInvoice } from '@/lib/tuition/server/payer-bills';
import { OwnShare } from '../_components/own-share';

export const metadata = { title: 'Invoice' };

export default async function BillPage({ params }: { params: Promise<{ invoiceId: string }> }) {
  const context = await requireContextTo('read', 'InvoiceShare');
  const invoice = await orNotFound(payerInvoice(await params, context));
  const words = { currency: invoice.currency, locale: context.school.locale };
  return (
    <>
      <div className="no-print">
        <PageHeader title={invoice.label} sub={<ShareChip state={invoice.state} />} actions={<><ButtonLink href="/bills" kind="quiet">All bills</ButtonLink><PrintButton /></>} />
      </div>
      <InvoicePaper schoolName={context.school.name} seller={invoice.seller} head={invoice} to={{ name: invoice.payerName, address: invoice.payerAddress }} lines={invoice.lines} words={words}>
        <OwnShare invoice={invoice} words={words} />
      </InvoicePaper>
    </>
  );
}
