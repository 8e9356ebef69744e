import { PageHeader } from '@/components/ui/page-header';
import { TakePayment } from '@/components/tuition/take-payment';
import { requireContextTo } from '@/lib/server/context';
import { paymentList } from '@/lib/tuition/server/staff-invoice';
import { payerChoices } from '@/lib/tuition/server/take-desk-payment';
import { paymentsToTake } from '@/lib/tuition/server/take-payment-list';
import { previewPayment, takePayment } from '../actions';
import { TuitionSections } from '../_components/tuition-sections';
import { PaymentTable } from './_components/payment-table';

export const metadata = { title: 'Payments' };

export default async function PaymentsPage() {
  const context = await requireContextTo('read', 'Payment');
  const [rows, payers] = [await paymentList(context), await payerChoices(context)];
  return (
    <>
      <PageHeader title="Payments" sub="Every payment has a receipt and says what it settled." actions={<TakePayment payers={payers} today={context.today} take={takePayment} preview={previewPayment} />} />
      <TuitionSections current="/tuition/payments" />
      <PaymentTable rows={rows} locale={context.school.locale} toTake={await paymentsToTake(context)} />
    </>
  );
}
