import Link from 'next/link';
import { Find } from '@/components/shell/find';
import { ButtonLink } from '@/components/ui/button';
import { PageHeader } from '@/components/ui/page-header';
import { plural } from '@/lib/format';
import { readEnquiries } from '@/lib/calendar/server/read-enquiries';
import { requireContextTo } from '@/lib/server/context';
import { may } from '@/policies/ability';
import { EnquiryList } from './_components/enquiry-list';

export const metadata = { title: 'Enquiries' };

export default async function EnquiriesPage() {
  const context = await requireContextTo('read', 'Enquiry');
  const { open, ended } = await readEnquiries(context);
  return (
    <>
      <PageHeader title="Enquiries" sub={`${plural(open.length, 'open enquiry', 'open enquiries')}, oldest first.`} actions={<><Find /><ButtonLink href="/enquiries/new" kind="primary">New enquiry</ButtonLink></>} />
      <EnquiryList open={open} ended={ended} locale={context.school.locale} zone={context.school.zone} now={context.now} today={context.today} mayExport={may(context.ability, 'export', 'Enquiry')} />
      <p className="mt-4 text-small text-ink-3">Strangers ask through the page <Link href="/trial" className="text-petrol underline">Ask for a trial lesson</Link>; put its address on the school’s own site.</p>
    </>
  );
}
