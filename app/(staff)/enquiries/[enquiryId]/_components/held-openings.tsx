'use client';

import { useRouter } from 'next/navigation';
import { useTransition } from 'react';
import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { Sheet } from '@/components/ui/sheet';
import type { EnquiryScreen } from '@/lib/calendar/server/read-enquiries';
import { formatDate, formatInstant, formatTimeRange } from '@/lib/format';
import { bookHeldTrial, release } from '../../../openings/actions';

type Offer = EnquiryScreen['offers'][number];

/** Openings kept for this family; one press books the trial and writes to them. */
export function HeldOpenings({ offers, school }: { offers: readonly Offer[]; school: { locale: string; zone: string } }) {
  return (
    <Sheet flush eyebrow="Held for this family">
      <ul>{offers.map((offer) => <HeldRow key={offer.id} offer={offer} school={school} />)}</ul>
    </Sheet>
  );
}

function HeldRow({ offer, school }: { offer: Offer; school: { locale: string; zone: string } }) {
  const router = useRouter();
  const [pending, startTransition] = useTransition();
  const press = (send: typeof bookHeldTrial | typeof release, done: string) => startTransition(async () => {
    const result = await send({ offerId: offer.id }).catch(() => null);
    if (result?.ok) toast.success(done);
    else toast.error(result?.message ?? 'This did not reach the school. Press again.');
    router.refresh();
  });
  return (
    <li className="flex flex-wrap items-center justify-between gap-3 border-t border-rule px-4 py-3">
      <div>
        <p><b className="num">{formatDate(offer.localDate, school.locale, 'short')} {formatTimeRange(offer.startMin, offer.lengthMinutes)}</b> · {offer.roomName} · {offer.teacherName}</p>
        <p className="text-small text-ink-3">Held until {formatInstant(offer.heldUntil, school)}</p>
      </div>
      <div className="flex gap-2">
        <Button kind="quiet" pending={pending} onClick={() => press(release, 'The opening is free again.')}>Give back</Button>
        <Button kind="primary" pending={pending} onClick={() => press(bookHeldTrial, 'The trial is booked and the family has been written to.')}>Book the trial</Button>
      </div>
    </li>
  );
}
