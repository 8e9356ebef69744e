import { PageHeader } from '@/components/ui/page-header';
import { say } from '@/lib/explained';
import { sumOf } from '@/lib/money';
import { requireContextTo } from '@/lib/server/context';
import { invoiceList } from '@/lib/tuition/server/staff-invoice';
import { invoicesToTake } from '@/lib/tuition/server/take-invoice-list';
import { TuitionSections } from '../_components/tuition-sections';
import { InvoiceTable } from './_components/invoice-table';

export const metadata = { title: 'Invoices' };

export default async function InvoicesPage() {
  const context = await requireContextTo('read', 'Invoice');
  const rows = await invoiceList(context);
  const words = { currency: context.school.currency, locale: context.school.locale };
  return (
    <>
      <PageHeader title="Invoices" sub={`Open altogether: ${say(sumOf(rows.map(({ openMinor }) => openMinor)), words)}`} />
      <TuitionSections current="/tuition/invoices" />
      <InvoiceTable rows={rows} locale={words.locale} toTake={await invoicesToTake(context)} />
    </>
  );
}
