import { PageHeader } from '@/components/ui/page-header';
import { searchFacts } from '@/lib/calendar/server/read-enquiries';
import { requireContextTo } from '@/lib/server/context';
import { DeskEnquiryForm } from './_components/desk-enquiry-form';

export const metadata = { title: 'New enquiry' };

export default async function NewEnquiryPage() {
  const context = await requireContextTo('create', 'Enquiry');
  const { sites } = await searchFacts(context);
  return (
    <div className="max-w-[620px]">
      <PageHeader title="New enquiry" sub="Take down what the caller says; the openings come next." />
      <DeskEnquiryForm sites={sites} />
    </div>
  );
}
