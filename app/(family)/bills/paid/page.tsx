import { notFound } from 'next/navigation';
import { PageHeader } from '@/components/ui/page-header';
import { requireContextTo } from '@/lib/server/context';
import { orNotFound } from '@/lib/server/or-not-found';
import { readCardPayment } from '@/lib/tuition/server/start-card-payment';
import { PaymentWatch } from './_components/payment-watch';

export const metadata = { title: 'Payment' };

export default async function PaidPage({ searchParams }: { searchParams: Promise<{ attempt?: string }> }) {
  const context = await requireContextTo('read', 'InvoiceShare');
  const { attempt } = await searchParams;
  if (!attempt) notFound();
  const first = await orNotFound(readCardPayment({ attemptId: attempt }, context));
  return (
    <>
      <PageHeader title="Your payment" />
      <PaymentWatch attemptId={attempt} first={first} locale={context.school.locale} />
    </>
  );
}
