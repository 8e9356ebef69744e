'use client';

import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { useTransition } from 'react';
import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { Chip } from '@/components/ui/chip';
import { Sheet } from '@/components/ui/sheet';
import { EmptyState, ListSkeleton } from '@/components/ui/states';
import type { Enquiry } from '@/db/enquiries';
import type { FoundOpenings, NamedOpening } from '@/lib/calendar/server/find-openings-for';
import { formatDate, formatTimeRange } from '@/lib/format';
import { hold } from '../actions';

type OpeningResultsProps = { found: FoundOpenings | null; pending: boolean; enquiry: Enquiry | null; subjectId: string; isWeekly: boolean; locale: string; onTaken: () => void };

export function OpeningResults({ found, pending, enquiry, subjectId, isWeekly, locale, onTaken }: OpeningResultsProps) {
  if (pending && !found) return <Sheet flush><ListSkeleton rows={6} label="Looking for openings" /></Sheet>;
  if (!found) return <Sheet flush><EmptyState title="Say when the student could come">Tick the parts of the week that suit, then press “Find openings”.</EmptyState></Sheet>;
  return (
    <div className="flex flex-col gap-4" aria-live="polite">
      <Sheet flush eyebrow={isWeekly ? 'Free every week' : 'Free'}>
        {found.openings.length === 0 ? <p className="px-4 pb-4">No opening satisfies every rule. {found.nearMisses.length > 0 ? 'These come nearest:' : 'Try another day, length or site.'}</p> : (
          <ol>{found.openings.map((opening) => <OpeningRow key={keyOf(opening)} opening={opening} enquiry={enquiry} subjectId={subjectId} isWeekly={isWeekly} locale={locale} onTaken={onTaken} />)}</ol>
        )}
      </Sheet>
      {found.nearMisses.length > 0 ? (
        <Sheet flush eyebrow="Nearly, with the one rule in the way">
          <ul>
            {found.nearMisses.map((miss) => (
              <li key={keyOf(miss) + miss.sentence} className="border-t border-rule px-4 py-3">
                <p><b>{whenOf(miss, isWeekly, locale)}</b> · {miss.roomName} · {miss.teacherName}</p>
                <p className="text-small text-brass">{miss.sentence}</p>
              </li>
            ))}
          </ul>
        </Sheet>
      ) : null}
    </div>
  );
}

const keyOf = ({ localDate, startMin, teacherId, roomId, weekday }: NamedOpening) => `${localDate}-${weekday}-${startMin}-${teacherId}-${roomId}`;
const whenOf = ({ localDate, startMin, lengthMinutes }: NamedOpening, isWeekly: boolean, locale: string) =>
  `${formatDate(localDate, locale, isWeekly ? 'weekday' : 'short')} ${formatTimeRange(startMin, lengthMinutes)}`;

type RowProps = Omit<OpeningResultsProps, 'found' | 'pending'> & { opening: NamedOpening };

function OpeningRow({ opening, enquiry, subjectId, isWeekly, locale, onTaken }: RowProps) {
  const router = useRouter();
  const [pending, startTransition] = useTransition();
  const { teacherId, roomId, siteId, localDate, startMin, lengthMinutes } = opening;
  const keep = () => startTransition(async () => {
    if (!enquiry) return;
    const result = await hold({ teacherId, roomId, siteId, localDate, startMin, lengthMinutes, enquiryId: enquiry.id, subjectId, isWeekly }).catch(() => null);
    if (result?.ok) return router.push(`/enquiries/${enquiry.id}`);
    toast.error(result?.message ?? 'This did not reach the school. Press again.');
    onTaken();
  });
  const query = new URLSearchParams({ teacher: teacherId, room: roomId, site: siteId, date: localDate, start: String(startMin), length: String(lengthMinutes) });
  return (
    <li className="flex flex-wrap items-center justify-between gap-x-4 gap-y-2 border-t border-rule px-4 py-3">
      <div>
        <p><b className="num">{whenOf(opening, isWeekly, locale)}</b> · {opening.roomName} · {opening.teacherName}</p>
        <p className="text-small text-ink-3">{opening.siteName}{opening.roomDescription ? `, ${opening.roomDescription}` : ''}</p>
        {opening.freeWords ? <Chip tone="wait">{opening.freeWords}: not on {opening.takenDates.map((date) => formatDate(date, locale)).join(', ')}</Chip> : null}
      </div>
      {enquiry ? <Button pending={pending} onClick={keep}>Hold</Button> : <Link href={`/book?${query}`} className="font-semibold text-petrol">Book</Link>}
    </li>
  );
}
