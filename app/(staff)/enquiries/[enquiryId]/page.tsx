import { notFound } from 'next/navigation';
import { ButtonLink } from '@/components/ui/button';
import { PageHeader } from '@/components/ui/page-header';
import { ENQUIRY_WORDS } from '@/lib/calendar/enquiry-words';
import { readEnquiry } from '@/lib/calendar/server/read-enquiries';
import { requireContextTo } from '@/lib/server/context';
import { EnquiryFacts } from './_components/enquiry-facts';
import { HeldOpenings } from './_components/held-openings';
import { TrialSheet } from './_components/trial-sheet';

export const metadata = { title: 'Enquiry' };

export default async function EnquiryPage({ params }: { params: Promise<{ enquiryId: string }> }) {
  const context = await requireContextTo('read', 'Enquiry');
  const screen = await readEnquiry({ id: (await params).enquiryId }, context);
  if (!screen) notFound();
  const { enquiry, offers, trial } = screen;
  const isOpen = enquiry.state !== 'enrolled' && enquiry.state !== 'closed';
  return (
    <>
      <PageHeader title={enquiry.studentName} sub={`Enquiry by ${enquiry.contactName}: ${ENQUIRY_WORDS[enquiry.state]}.`}
        actions={isOpen && !trial ? <ButtonLink kind={offers.length > 0 ? 'plain' : 'primary'} href={`/openings?enquiry=${enquiry.id}`}>Find an opening</ButtonLink> : null} />
      <div className="grid items-start gap-4 lg:grid-cols-[minmax(0,1fr)_360px]">
        <div className="flex flex-col gap-4">
          {trial ? <TrialSheet trial={trial} enquiry={enquiry} school={context.school} today={context.today} /> : null}
          {offers.length > 0 ? <HeldOpenings offers={offers} school={context.school} /> : null}
          <EnquiryFacts screen={screen} school={context.school} />
        </div>
      </div>
    </>
  );
}
