import Link from 'next/link';
import { redirect } from 'next/navigation';
import { PageHeader } from '@/components/ui/page-header';
import { Sheet } from '@/components/ui/sheet';
import { EmptyState } from '@/components/ui/states';
import { familyLessons } from '@/lib/calendar/server/family-lessons';
import { requireContextTo } from '@/lib/server/context';

export const metadata = { title: 'Progress' };

export default async function ProgressIndexPage() {
  const context = await requireContextTo('read', 'Progress');
  const { students } = await familyLessons({ from: context.today, until: context.today }, context);
  const [only] = students;
  if (only && students.length === 1) redirect(`/progress/${only.id}`);
  return (
    <>
      <PageHeader title="Progress" />
      <Sheet flush>
        {students.length === 0 ? <EmptyState title="Nobody to show">Progress appears with the first lesson.</EmptyState> : (
          <ul>{students.map(({ id, name }) => <li key={id} className="border-b border-rule last:border-b-0"><Link href={`/progress/${id}`} className="block px-4 py-4 font-display text-h2 font-semibold text-ink no-underline hover:bg-wash">{name}</Link></li>)}</ul>
        )}
      </Sheet>
    </>
  );
}
