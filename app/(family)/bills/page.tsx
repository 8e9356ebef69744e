import { PageHeader } from '@/components/ui/page-header';
import { requireContextTo } from '@/lib/server/context';
import { payerBills } from '@/lib/tuition/server/payer-bills';
import { BillList, PaymentHistory } from './_components/bill-list';
import { NextDue } from './_components/next-due';

export const metadata = { title: 'Bills' };

export default async function BillsPage() {
  const context = await requireContextTo('read', 'InvoiceShare');
  const bills = await payerBills(context);
  const { locale } = context.school;
  return (
    <>
      <PageHeader title="Bills" sub="Your own bills and payments." />
      <div className="flex flex-col gap-4">
        {bills.bills.length > 0 ? <NextDue bills={bills} locale={locale} /> : null}
        <BillList bills={bills.bills} locale={locale} />
        <PaymentHistory payments={bills.payments} locale={locale} />
      </div>
    </>
  );
}
