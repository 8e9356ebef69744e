import Link from 'next/link';
import { redirect } from 'next/navigation';
import { PageHeader } from '@/components/ui/page-header';
import { EmptyState } from '@/components/ui/states';
import { climbersOf } from '@/lib/ladder/server/climbers-of';
import { requireContextTo } from '@/lib/server/context';

export const metadata = { title: 'Progress' };

/** One student: straight to their ladder. Several children: choose whose. */
export default async function ProgressListPage() {
  const context = await requireContextTo('read', 'Progress');
  const students = await climbersOf(context);
  if (students.length === 1) redirect(`/progress/${students[0]?.id ?? ''}`);
  return (
    <>
      <PageHeader title="Progress" sub={students.length > 0 ? 'Whose ladder would you like to see?' : undefined} />
      {students.length === 0 ? <EmptyState title="Nobody’s ladder is open to you yet">Once a child is enrolled and the school has linked you, their progress is here. The school can tell you more.</EmptyState> : (
        <ul className="grid gap-3">
          {students.map(({ id, name }) => <li key={id}><Link href={`/progress/${id}`} className="sheet block p-4 font-display text-h2 font-semibold text-ink no-underline hover:bg-wash">{name}</Link></li>)}
        </ul>
      )}
    </>
  );
}
