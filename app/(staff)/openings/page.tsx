import { PageHeader } from '@/components/ui/page-header';
import { readEnquiries, searchFacts } from '@/lib/calendar/server/read-enquiries';
import { requireContextTo } from '@/lib/server/context';
import { OpeningFinder } from './_components/opening-finder';

export const metadata = { title: 'Find an opening' };

export default async function OpeningsPage({ searchParams }: { searchParams: Promise<{ enquiry?: string; student?: string; weekly?: string }> }) {
  const context = await requireContextTo('create', 'Occurrence');
  const { enquiry, weekly } = await searchParams;
  const { open } = await readEnquiries(context);
  const chosen = open.find(({ id }) => id === enquiry) ?? null;
  return (
    <>
      <PageHeader title="Find an opening" sub={chosen ? `For ${chosen.studentName}, asked by ${chosen.contactName}.` : 'Say when the student could come; the true openings come first.'} />
      <OpeningFinder facts={await searchFacts(context)} enquiry={chosen} isWeekly={weekly === '1'} locale={context.school.locale} />
    </>
  );
}
