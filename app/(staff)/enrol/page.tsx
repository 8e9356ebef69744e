import { notFound } from 'next/navigation';
import { PageHeader } from '@/components/ui/page-header';
import { enrolFacts } from '@/lib/calendar/server/enrol-facts';
import { requireContextTo } from '@/lib/server/context';
import { EnrolScreen } from './_components/enrol-screen';

export const metadata = { title: 'Enrol' };

export default async function EnrolPage({ searchParams }: { searchParams: Promise<{ enquiry?: string; student?: string }> }) {
  const context = await requireContextTo('create', 'Enrolment');
  const { enquiry, student } = await searchParams;
  const facts = await enrolFacts({ enquiryId: enquiry ?? null, studentId: student ?? null }, context);
  if (!facts) notFound();
  return (
    <>
      <PageHeader title={`Enrol ${facts.studentName}`} sub="The weekly lesson appears on every teaching day to the end of the term. Nothing is written unless all of it fits." />
      <EnrolScreen facts={facts} locale={context.school.locale} currency={context.school.currency} />
    </>
  );
}
