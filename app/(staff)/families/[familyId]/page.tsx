import Link from 'next/link';
import { notFound } from 'next/navigation';
import { FamilyBalance } from '@/components/tuition/family-balance';
import { TakePayment } from '@/components/tuition/take-payment';
import { PageHeader } from '@/components/ui/page-header';
import { Sheet } from '@/components/ui/sheet';
import { readFamily } from '@/lib/people/server/read-families';
import { requireContextTo } from '@/lib/server/context';
import { familyBalance } from '@/lib/tuition/server/staff-invoice';
import { previewPayment, takePayment } from '../../tuition/actions';

export const metadata = { title: 'Family' };

export default async function FamilyPage({ params }: { params: Promise<{ familyId: string }> }) {
  const context = await requireContextTo('read', 'Family');
  const family = await readFamily({ id: (await params).familyId }, context);
  if (!family) notFound();
  const balance = await familyBalance({ familyId: family.id }, context);
  const payers = balance.payers.map(({ payerId, name }) => ({ payerId, name, familyName: family.name, currency: balance.currency }));
  return (
    <>
      <PageHeader title={`${family.name} family`} />
      <div className="grid items-start gap-4 lg:grid-cols-2">
        <Sheet eyebrow="Students">
          <ul className="flex flex-col gap-2">
            {family.students.map(({ id, name }) => <li key={id}><Link href={`/students/${id}`} className="font-semibold text-petrol">{name}</Link></li>)}
          </ul>
        </Sheet>
        <Sheet eyebrow="Payers">
          <ul className="flex flex-col gap-3">
            {family.payers.map(({ payerId, name, email, phone }) => (
              <li key={payerId}>
                <p className="font-semibold">{name}</p>
                <p className="text-small text-ink-3">{[email, phone].filter(Boolean).join(', ') || 'no address on record'}</p>
              </li>
            ))}
          </ul>
          {family.payers.length > 1 ? <p className="mt-3 rounded bg-brass-wash px-3 py-2 text-small text-brass">Payers of this family do not see each other’s share, payments or address. Say nothing of one to the other.</p> : null}
        </Sheet>
      </div>
      <div className="mt-4">
        <FamilyBalance balance={balance} locale={context.school.locale} action={<TakePayment payers={payers} today={context.today} take={takePayment} preview={previewPayment} />} />
      </div>
    </>
  );
}
