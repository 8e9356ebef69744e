import { redirect } from 'next/navigation';
import { publicSchool } from '@/lib/people/server/public-school';
import { publicMoment } from '@/lib/server/request-facts';
import { EnquiryForm } from './_components/enquiry-form';

export const metadata = { title: 'Ask for a trial lesson' };

export default async function TrialPage() {
  const school = await publicSchool(await publicMoment());
  if (!school) redirect('/set-up');
  return (
    <div className="py-8">
      <h1 className="text-h1">Ask for a trial lesson</h1>
      <p className="mb-6 mt-1 max-w-[52ch] text-ink-3">
        Tell us who would like to play and when you could come. {school.name} answers within one working day with two times that are really free.
        {school.publicPhone ? ` Or ring ${school.publicPhone}.` : ''}
      </p>
      <EnquiryForm sites={school.sites} />
    </div>
  );
}
